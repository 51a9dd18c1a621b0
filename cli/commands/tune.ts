import { type Tuning, tuneFeedforward, writeTuning } from "../../verification/index.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { writeFileWhole } from "../files/write-file.ts";
import { jsonText, mention, refuse } from "../findings.ts";
import { loadLoop } from "../load-loop.ts";
import { requirePlant } from "../require-tests.ts";
import type { Session } from "../session.ts";

/** The lines of the new text that differ from the old, with their numbers. */
function changedLines(before: string, after: string): string[] {
  const old = before.split("\n");
  return after
    .split("\n")
    .map((line, i) => ({ line, number: i + 1, same: line === old[i] }))
    .filter(({ same }) => !same)
    .map(({ line, number }) => `${String(number).padStart(5)} | ${line}`);
}

function remarks({ outOfReach, gateArea, feedforward }: Tuning): string[] {
  const cells = outOfReach.map(({ row, column, why }) => `row ${row + 1}, column ${column + 1}: ${why}`);
  return [
    ...(gateArea === undefined && feedforward === undefined
      ? ["the spec has neither a gate curve nor a feedforward table"]
      : []),
    ...(cells.length > 0
      ? [`out of the plant's reach, continued from the neighbours: ${cells.join("; ")}`]
      : []),
  ];
}

/** `tune SPEC`: gate curve and feedforward table from the plant's steady states; `--write` puts them into the spec. */
export function tune(specPath: string, options: { readonly write?: boolean }, session: Session): ExitCode {
  const loaded = loadLoop(specPath);
  if (loaded.value === undefined) return refuse(loaded, session, "nothing was tuned");
  mention(loaded, session);
  requirePlant(loaded.value);
  const tuning = tuneFeedforward(loaded.value);
  const before = loaded.sources[0].text;
  const after = writeTuning(before, loaded.value, tuning);
  const lines = changedLines(before, after);
  if (options.write === true && lines.length > 0) writeFileWhole(specPath, after);
  if (session.json) {
    const { gateArea = null, feedforward = null, outOfReach } = tuning;
    session.result(
      jsonText({
        ok: true,
        gate_area_mm2: gateArea,
        feedforward,
        out_of_reach: outOfReach,
        changed_lines: lines.length,
      }),
    );
    return EXIT.fine;
  }
  for (const remark of remarks(tuning)) session.note(remark);
  if (lines.length === 0) session.note(`${specPath}: the values are already what the plant says`);
  else session.result(lines.join("\n"));
  if (options.write === true && lines.length > 0) session.note(`wrote ${specPath}`);
  return EXIT.fine;
}
