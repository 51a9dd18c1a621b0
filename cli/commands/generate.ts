import { createHash } from "node:crypto";
import { generateKit, type Kit, type Program } from "../../generator/index.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { requireOutputFolder } from "../files/require-outputs.ts";
import { writeFolderWhole } from "../files/write-folder.ts";
import { jsonText, mention, refuse } from "../findings.ts";
import { loadLoop } from "../load-loop.ts";
import { runtimeText } from "../runtime-text.ts";
import type { Session } from "../session.ts";

const sha256 = (text: string): string => createHash("sha256").update(text).digest("hex");

/** A checked spec must compile: a refusal here is a mistake of ours, and is reported as one. */
export function mustCompile(kit: Kit): Program {
  if (kit.program !== undefined) return kit.program;
  const lines = kit.refusals.map(({ code, at, message }) => `${at.file}:${at.line}: ${message} (${code})`);
  throw new Error(`the generator refused its own runtime\n  ${lines.join("\n  ")}`);
}

/** `generate SPEC --out DIR`: the controller as TypeScript and C, all files or none. */
export function generate(specPath: string, options: { readonly out: string }, session: Session): ExitCode {
  const loaded = loadLoop(specPath);
  if (loaded.value === undefined) return refuse(loaded, session, "nothing was written");
  mention(loaded, session);
  const inputs = loaded.sources.map(({ file }) => file);
  requireOutputFolder("--out", options.out, inputs);
  const kit = generateKit(loaded.value, runtimeText());
  mustCompile(kit);
  writeFolderWhole(options.out, kit.files);
  const controller = loaded.value.controller.name;
  if (session.json) {
    const files = [...kit.files].map(([path, text]) => ({ path, sha256: sha256(text) }));
    session.result(jsonText({ ok: true, controller, files }));
  } else {
    session.note(`${controller}: wrote ${kit.files.size} files to ${options.out}`);
    for (const [path, text] of kit.files) session.note(`  ${path}  ${text.split("\n").length - 1} lines`);
  }
  return EXIT.fine;
}
