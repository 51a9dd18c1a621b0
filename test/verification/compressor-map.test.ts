import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { plantParameters } from "../../hil-sim/index.ts";
import { mapFlow, usableHead } from "../../hil-sim/plant/compressor.ts";
import { readPlant } from "../../spec/index.ts";
import { compressorMap } from "../../verification/compressor-map.ts";

const FILES = ["examples/skarn24/skarn24.plant.yaml", "examples/skarn30/skarn30.plant.yaml"];

function parametersOf(file: string) {
  const { plant, diagnostics } = readPlant({ file, text: readFileSync(file, "utf8") });
  if (plant === undefined) throw new Error(`${file} has ${diagnostics.length} findings`);
  return plantParameters(plant);
}

describe.each(FILES)("the compressor map of %s", (file) => {
  const parameters = parametersOf(file);
  const map = compressorMap(parameters);

  test("has lines up to the speed limit and one beyond, from surge to choke with falling pressure ratio", () => {
    const speeds = map.speedLines.map(({ correctedSpeedRpm }) => correctedSpeedRpm);
    const limit = parameters.turboSpeedLimit / (Math.PI / 30);
    expect(speeds.filter((speed) => speed >= limit).length).toBeLessThanOrEqual(1);
    expect(speeds.at(-1)).toBeGreaterThanOrEqual(limit - 25_000);
    for (const { points } of map.speedLines) {
      expect(
        points.every(([flow, ratio], i) => i === 0 || (flow > points[i - 1][0] && ratio < points[i - 1][1])),
      ).toBe(true);
    }
    expect(map.surge).toEqual(map.speedLines.map(({ points }) => points[0]));
    expect(map.choke).toEqual(map.speedLines.map(({ points }) => points.at(-1)));
  });

  test("draws the plant's own static map: the flow it gives at each drawn pressure ratio is the drawn one", () => {
    let compared = 0;
    for (const { correctedSpeedRpm, points } of map.speedLines) {
      const tipSpeed = (parameters.compressorRadius * correctedSpeedRpm * Math.PI) / 30;
      const speedRatio = tipSpeed / parameters.referenceTipSpeed;
      const head = usableHead(parameters, tipSpeed, speedRatio, parameters.mapTemperature);
      // Above `tangentFrom` the plant leaves the ellipse for its tangent; the map keeps the ellipse there.
      const height = (ratio: number): number =>
        (ratio - points[points.length - 1][1]) / (points[0][1] - points[points.length - 1][1]);
      for (const [flow, ratio] of points.filter(
        ([, value]) => height(value) < parameters.tangentFrom - 0.001,
      )) {
        expect(mapFlow(parameters, head, speedRatio, ratio, flow)).toBeCloseTo(flow, 4);
        compared += 1;
      }
    }
    expect(compared).toBeGreaterThan(100);
  });
});
