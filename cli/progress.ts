import type { Session } from "./session.ts";

export interface Progress {
  /** Call as often as convenient; drawing is limited. */
  readonly update: (done: number, total: number) => void;
  readonly end: () => void;
}

const PATIENCE_MS = 1000;
const SILENT: Progress = { update: () => {}, end: () => {} };

/** `verify: 412 of 1000 simulations, 80/s, 8 s left` */
export function progressText(
  what: string,
  unit: string,
  done: number,
  total: number,
  seconds: number,
): string {
  const rate = done / seconds;
  const left = rate > 0 ? `, ${Math.ceil((total - done) / rate)} s left` : "";
  return `${what}: ${done} of ${total} ${unit}, ${rate < 10 ? rate.toFixed(1) : rate.toFixed(0)}/s${left}`;
}

/** Progress on standard error for work that takes longer than a second; silent where nobody watches. */
export async function openProgress(session: Session, what: string, unit: string): Promise<Progress> {
  if (!session.interactive) return SILENT;
  const { default: ora } = await import("ora");
  const spinner = ora({ stream: process.stderr, ...(session.colour ? {} : { color: false }) });
  const begun = performance.now();
  return {
    update: (done, total) => {
      const elapsed = performance.now() - begun;
      if (elapsed < PATIENCE_MS) return;
      spinner.text = progressText(what, unit, done, total, elapsed / 1000);
      if (!spinner.isSpinning) spinner.start();
    },
    end: () => {
      if (spinner.isSpinning) spinner.stop();
    },
  };
}
