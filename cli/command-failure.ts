import { EXIT, type ExitCode } from "./exit-codes.ts";

/** Ends a command with a plain sentence instead of a stack: a class so that `instanceof` tells it from our own mistakes. */
export class CommandFailure extends Error {
  readonly exitCode: ExitCode;

  constructor(message: string, exitCode: ExitCode = EXIT.wrongUse) {
    super(message);
    this.exitCode = exitCode;
  }
}
