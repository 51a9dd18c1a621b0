import { describe, expect, it } from "vitest";
import { plantParameters } from "../../hil-sim/index.ts";
import { drawRun, scenarioOf } from "../../verification/draw.ts";
import { findCommands } from "../../verification/patterns/commands.ts";
import { reachOfCommands } from "../../verification/reachability.ts";
import { engineA } from "../hil-sim/engines.ts";
import { scenario } from "./scenarios.ts";
import { traceOf } from "./traces.ts";

const fixed = scenarioOf(scenario(), drawRun(scenario(), 0, 1, 0));
const parameters = plantParameters(engineA);

/** Reach of holds of one second each, at an engine speed, wide open throttle. */
function reachOf(rpm: number, targetsKpa: readonly number[]) {
  const length = 1000 * targetsKpa.length;
  const trace = traceOf(0.001, length, {
    boost_wanted: (seconds) => targetsKpa[Math.floor(seconds + 1e-9)],
    engine_speed: () => rpm,
    accelerator: () => 1,
  });
  return reachOfCommands(parameters, fixed, trace, findCommands(trace), 5);
}

// Steady map of the invented engine by an independent solver (25 degC, sea level, wide open throttle), bar abs:
//   5000 rpm: closed 3.95, open 1.16;  7000 rpm: closed 3.55, open 1.412
describe("what a plant can hold", () => {
  it("lies between the steady boost of the open and of the closed gate", () => {
    expect(reachOf(5000, [200, 392, 200, 398]).map(({ holds }) => holds)).toEqual([false, true, true, false]);
    expect(reachOf(7000, [200, 143, 200, 139]).map(({ holds }) => holds)).toEqual([false, true, true, false]);
  });

  it("is asked of the hold that opens a trace only where no command follows", () => {
    expect(reachOf(5000, [200])).toEqual([{ holds: true, withRoom: true }]);
    expect(reachOf(7000, [139])).toEqual([{ holds: false, withRoom: false }]);
    expect(reachOf(5000, [200, 240])[0]).toEqual({ holds: false, withRoom: false });
  });

  it("needs 2.5 % of room on either side to settle", () => {
    expect(reachOf(5000, [200, 380])[1]).toEqual({ holds: true, withRoom: true });
    expect(reachOf(5000, [200, 390])[1]).toEqual({ holds: true, withRoom: false });
    expect(reachOf(7000, [200, 143])[1]).toEqual({ holds: true, withRoom: false });
    expect(reachOf(7000, [200, 150])[1]).toEqual({ holds: true, withRoom: true });
  });

  it("a step counts only if the hold it leaves was held, or asked for no boost", () => {
    expect(reachOf(7000, [120, 200])[1]).toEqual({ holds: true, withRoom: false });
    expect(reachOf(7000, [100, 200])[1]).toEqual({ holds: true, withRoom: true });
    expect(reachOf(7000, [160, 200])[1]).toEqual({ holds: true, withRoom: true });
  });
});
