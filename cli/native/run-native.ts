import { spawn } from "node:child_process";

/** Feeds bytes to a program and gathers what it writes; throws when it ends badly. */
export const runNative = (program: string, input: Uint8Array): Promise<Buffer> =>
  new Promise((resolve, reject) => {
    const child = spawn(program, [], { stdio: ["pipe", "pipe", "inherit"] });
    const chunks: Buffer[] = [];
    child.stdout.on("data", (chunk: Buffer) => chunks.push(chunk));
    // A program that dies early closes its input; its exit code tells more than the broken pipe.
    child.stdin.on("error", () => undefined);
    child.on("error", reject);
    child.on("close", (code, signal) =>
      code === 0
        ? resolve(Buffer.concat(chunks))
        : reject(new Error(`${program} ended with ${signal ?? `code ${code}`}`)),
    );
    child.stdin.end(input);
  });
