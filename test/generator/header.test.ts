import { describe, expect, test } from "vitest";
import { printC } from "../../generator/index.ts";
import { compileSpec, exampleSpec, runtimeText } from "../agreement/compile-spec.ts";
import { SKARN24 } from "../support/smallest.ts";
import { cannotUse } from "../support/tool.ts";
import { runIn, writeAll } from "./native.ts";
import { SPECIMEN, specimenProgram } from "./specimen/lowered.ts";

const headerOf = (program: Parameters<typeof printC>[0]): string =>
  // a sentence may be broken over lines
  (printC(program).get(`${program.name}.h`) ?? "").replace(/\n \* /g, " ");

describe("the header of the complete example", () => {
  const program = compileSpec(exampleSpec(SKARN24), runtimeText());
  const header = headerOf(program);

  test.each([
    ["the slow step's period", "#define SKARN24_BOOST_STEP_BOOST_PERIOD_US (5000)\n"],
    ["the fast step's period", "#define SKARN24_BOOST_STEP_GUARD_PERIOD_US (1000)\n"],
    ["how often to call the slow step", "Call it every 5 ms."],
    ["how often to call the fast step", "Call it every 1 ms."],
    ["which step must not interrupt which", "It must never interrupt the fast step."],
    ["when init may run", "only while both tasks are stopped"],
    ["what to do instead of the steps", "hold the wastegate at its safe opening and limit engine torque"],
  ])("says %s", (_, text) => expect(header).toContain(text));

  test.skipIf(cannotUse("clang"))("serves a caller in C++", () => {
    const caller = `#include "${program.name}.h"\nint main() {\n  return ${program.name}_check_calibration(&${program.name}_calibration_default) + 1;\n}\n`;
    const folder = writeAll(new Map([...printC(program), ["main.cpp", caller]]));
    const stem = program.name;
    expect(
      runIn(folder, "clang", ["-std=c99", "-ffp-contract=off", "-c", `${stem}.c`, `${stem}_cal.c`]),
    ).toEqual({
      code: 0,
      said: "",
    });
    const flags = ["-Wall", "-Wextra", "-Wpedantic", "-Werror"];
    expect(
      runIn(folder, "clang", [...flags, "-o", "main", "main.cpp", `${stem}.o`, `${stem}_cal.o`]),
    ).toEqual({
      code: 0,
      said: "",
    });
    expect(runIn(folder, "./main", []).code).toBe(0);
  });
});

describe("a period in the header", () => {
  const withPeriod = (periodS: number) =>
    headerOf(
      specimenProgram({
        entries: SPECIMEN.entries.map((each) => (each.function === "stepSlow" ? { ...each, periodS } : each)),
      }),
    );
  test("is exact where decimal seconds are not", () => {
    expect(withPeriod(0.0003)).toContain("SPECIMEN_STEP_SLOW_PERIOD_US (300)\n");
  });
  test("is no number of microseconds when it is not a whole one", () => {
    const header = withPeriod(0.0000025);
    expect(header).not.toContain("SPECIMEN_STEP_SLOW_PERIOD_US");
    expect(header).toContain("Call it every 0.0025 ms.");
  });
  test("of another generation is refused by the code when compiled", () => {
    const program = specimenProgram();
    const files = new Map(
      [...printC(program)].map(([name, text]) => [
        name,
        text.replace("PERIOD_US (1250)", "PERIOD_US (1000)"),
      ]),
    );
    const { code, said } = runIn(writeAll(files), "gcc", ["-std=c99", "-c", "specimen.c"]);
    expect(code).not.toBe(0);
    expect(said).toContain("SPECIMEN_STEP_FAST_PERIOD_US must be 1250");
  });
});
