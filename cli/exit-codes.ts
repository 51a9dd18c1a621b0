/** What the process tells its caller. */
export const EXIT = {
  fine: 0,
  /** Spec errors, a violated requirement, a mismatch. */
  findings: 1,
  wrongUse: 2,
  ourFault: 3,
  interrupted: 130,
} as const;

export type ExitCode = (typeof EXIT)[keyof typeof EXIT];
