import { createHash } from "node:crypto";
import { generateKit } from "../generator/index.ts";
import type { LoopSpec } from "../spec/index.ts";
import type { Agreement, GeneratedFile, ReportContext } from "../verification/report/index.ts";
import { CommandFailure } from "./command-failure.ts";
import { DATA_LIMIT_BYTES, readLimited } from "./files/read-limited.ts";
import { runtimeText } from "./runtime-text.ts";

function generatedFiles(loop: LoopSpec): GeneratedFile[] {
  const { files } = generateKit(loop, runtimeText());
  return [...files].map(([path, text]) => ({
    path,
    bytes: Buffer.byteLength(text),
    sha256: createHash("sha256").update(text).digest("hex"),
  }));
}

/** A JSON document of ours from disk; ends the command if it is none. */
export function readJson(path: string, what: string): unknown {
  const outcome = readLimited(path, DATA_LIMIT_BYTES);
  if (!outcome.ok)
    throw new CommandFailure(`cannot read ${path}: ${outcome.problem.replaceAll("_", " ")}`, 1);
  try {
    return JSON.parse(new TextDecoder().decode(outcome.bytes));
  } catch {
    throw new CommandFailure(`${path} is not ${what}: it is not JSON`, 1);
  }
}

/** What `agree --out` wrote. */
function readAgreement(path: string): Agreement {
  const document = readJson(path, "the result of `agree`") as Partial<Agreement> | null;
  if (!Array.isArray(document?.targets) || !Array.isArray(document.notRun)) {
    throw new CommandFailure(`${path} is not the result of \`agree\``, 1);
  }
  return { targets: document.targets, notRun: document.notRun };
}

/** What the report shows beside the evidence. */
export function reportContext(loop: LoopSpec | undefined, agreement: string | undefined): ReportContext {
  return {
    ...(loop === undefined ? {} : { spec: loop, files: generatedFiles(loop) }),
    ...(agreement === undefined ? {} : { agreement: readAgreement(agreement) }),
  };
}
