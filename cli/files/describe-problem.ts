import { CommandFailure } from "../command-failure.ts";

const REASONS: Readonly<Record<string, string>> = {
  EACCES: "permission denied",
  EPERM: "permission denied",
  EROFS: "the file system is read-only",
  ENOSPC: "no space left",
  ENOTDIR: "a part of the path is not a folder",
  EISDIR: "it is a folder",
  ENAMETOOLONG: "the name is too long",
  ELOOP: "its symbolic links go round in a circle",
  EEXIST: "something is in the way",
  ENOENT: "no such file or folder, and none can be made there",
};

/** Turns an error of the operating system into one sentence; other errors pass unchanged. */
export function describeProblem(error: unknown, what: string): unknown {
  if (!(error instanceof Error) || !("code" in error) || typeof error.code !== "string") return error;
  return new CommandFailure(`${what}: ${REASONS[error.code] ?? error.code}`);
}
