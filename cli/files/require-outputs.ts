import { closeSync, mkdirSync, openSync, realpathSync, rmdirSync, rmSync, statSync } from "node:fs";
import { basename, dirname, join, resolve, sep } from "node:path";
import { CommandFailure } from "../command-failure.ts";
import { describeProblem } from "./describe-problem.ts";
import { firstMissing, ifThere } from "./make-folder.ts";
import { partialName } from "./write-file.ts";

/** Files to be written, by what the user calls them (`--csv`); undefined: not asked for. */
export type Outputs = Readonly<Record<string, string | undefined>>;

interface Place {
  readonly what: string;
  readonly path: string;
  /** Absolute, with the links above the name followed. */
  readonly real: string;
  /** Of the file that is there: equal for every name, link and hard link of one file. */
  readonly identity: string | undefined;
}

/** Follows the links of the part that is there. */
function realPath(path: string): string {
  const missing = firstMissing(path);
  if (missing === undefined) return realpathSync(path);
  return join(realpathSync(dirname(missing)), path.slice(dirname(missing).length));
}

function identityOf(path: string): string | undefined {
  const status = ifThere(() => statSync(path, { bigint: true }));
  return status === undefined ? undefined : `${status.dev}:${status.ino}`;
}

function placeOf(what: string, path: string): Place {
  const full = resolve(path);
  const real = join(realPath(dirname(full)), basename(full));
  const status = ifThere(() => statSync(full));
  if (status?.isDirectory()) throw new CommandFailure("it is a folder");
  if (status !== undefined && !status.isFile()) throw new CommandFailure("it is a device or a pipe");
  return { what, path, real, identity: identityOf(full) };
}

/** Makes and removes something in the nearest folder that is there: only trying tells whether writing is allowed. */
function probe(path: string): void {
  const missing = firstMissing(dirname(path));
  const trial = partialName(missing ?? path);
  if (missing === undefined) {
    closeSync(openSync(trial, "wx"));
    rmSync(trial);
  } else {
    mkdirSync(trial);
    rmdirSync(trial);
  }
}

function refuseSame(one: Place, other: Place): void {
  if (one.real === other.real || (one.identity !== undefined && one.identity === other.identity)) {
    throw new CommandFailure(
      `${one.what} ${one.path} and ${other.what} ${other.path} are the same file; give each its own`,
    );
  }
  const [outer, inner] = one.real.length < other.real.length ? [one, other] : [other, one];
  if (inner.real.startsWith(outer.real + sep)) {
    throw new CommandFailure(
      `${inner.what} ${inner.path} lies in ${outer.what} ${outer.path}, which is to be a file`,
    );
  }
}

function refuseInput({ what, path, identity }: Place, inputs: readonly string[]): void {
  const input = inputs.find((each) => identity !== undefined && identityOf(each) === identity);
  if (input === undefined) return;
  throw new CommandFailure(
    `${what} ${path} would overwrite ${input}, which this command reads; choose another file`,
  );
}

/** Runs a step of the check; what goes wrong names the output. */
function naming<T>(what: string, path: string, step: () => T): T {
  const says = `cannot write ${what} ${path}`;
  try {
    return step();
  } catch (error) {
    if (error instanceof CommandFailure) throw new CommandFailure(`${says}: ${error.message}`);
    throw describeProblem(error, says);
  }
}

/**
 * Ends the command before its work if an output is also an input or another output, or cannot be written.
 * The inputs must have been read already.
 */
export function requireOutputs(outputs: Outputs, inputs: readonly (string | undefined)[]): void {
  const read = inputs.filter((path) => path !== undefined);
  const places: Place[] = [];
  for (const [what, path] of Object.entries(outputs)) {
    if (path === undefined) continue;
    const place = naming(what, path, () => placeOf(what, path));
    refuseInput(place, read);
    for (const other of places) refuseSame(other, place);
    places.push(place);
  }
  for (const { what, path } of places) naming(what, path, () => probe(resolve(path)));
}

/** The same for a folder that is replaced as a whole: it must not hold an input. */
export function requireOutputFolder(what: string, folder: string, inputs: readonly string[]): void {
  const target = resolve(folder);
  const held = naming(what, folder, () =>
    inputs.find((path) => realpathSync(path).startsWith(realPath(target) + sep)),
  );
  if (held !== undefined) {
    throw new CommandFailure(
      `${what} ${folder} holds ${held}, which this command reads; choose another folder`,
    );
  }
  naming(what, folder, () => probe(target));
}
