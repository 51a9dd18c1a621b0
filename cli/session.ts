import type { Writable } from "node:stream";

/** What every command is told about its surroundings, and the only two ways it may speak. */
export interface Session {
  readonly json: boolean;
  readonly quiet: boolean;
  readonly colour: boolean;
  /** A person watches standard error, so progress may be drawn. */
  readonly interactive: boolean;
  /** The command's result: human text, or with `--json` the one document. */
  readonly result: (text: string) => void;
  /** Human text beside the result; silent under `--quiet`. */
  readonly note: (text: string) => void;
  /** Findings and failures; never silent. */
  readonly complain: (text: string) => void;
}

export interface CommonOptions {
  readonly json?: boolean;
  readonly quiet?: boolean;
  readonly color?: boolean;
}

const writeLine = (stream: Writable) => (text: string) => {
  stream.write(text.endsWith("\n") ? text : `${text}\n`);
};

/** NO_COLOR with a value that is not empty switches colour off (no-color.org). */
const wantsColour = (options: CommonOptions, environment: NodeJS.ProcessEnv): boolean =>
  options.color !== false && (environment.NO_COLOR ?? "") === "";

export function openSession(options: CommonOptions): Session {
  const json = options.json === true;
  const quiet = options.quiet === true;
  const people = json ? process.stderr : process.stdout;
  return {
    json,
    quiet,
    colour: wantsColour(options, process.env) && people.isTTY === true,
    interactive: !quiet && process.stderr.isTTY === true,
    result: writeLine(process.stdout),
    note: quiet ? () => {} : writeLine(people),
    complain: writeLine(process.stderr),
  };
}
