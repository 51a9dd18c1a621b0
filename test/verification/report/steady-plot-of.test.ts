import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { equilibriumAt, plantParameters } from "../../../hil-sim/index.ts";
import { mapFlow, usableHead } from "../../../hil-sim/plant/compressor.ts";
import { readPlant } from "../../../spec/index.ts";
import { compressorMap } from "../../../verification/compressor-map.ts";
import { steadyPlotOf } from "../../../verification/report/index.ts";

test("an equilibrium stands on the map where the plant's static map says it must", () => {
  const file = "examples/skarn24/skarn24.plant.yaml";
  const { plant } = readPlant({ file, text: readFileSync(file, "utf8") });
  if (plant === undefined) throw new Error(`${file} does not read`);
  const parameters = plantParameters(plant);
  const ambient = { pressure: 101_325, temperature: 298 };
  const equilibria = [3000, 5000, 7000].flatMap((engineSpeedRpm) =>
    [0.1, 0.3, 0.6].map((opening) => {
      const engineSpeed = (engineSpeedRpm * Math.PI) / 30;
      const point = { throttle: 1, bypass: 0, fuel: 1, engineSpeed };
      const at = { ...point, ambientPressure: ambient.pressure, ambientTemperature: ambient.temperature };
      return { engineSpeedRpm, state: equilibriumAt(parameters, at, opening).state };
    }),
  );
  const { lines } = steadyPlotOf("steady", parameters, ambient, compressorMap(parameters), equilibria);
  expect(lines.map(({ points }) => points.length)).toEqual([3, 3, 3]);
  lines
    .flatMap(({ points }) => points)
    .forEach((point, i) => {
      const { state } = equilibria[i];
      const tipSpeed = parameters.compressorRadius * state.turboSpeed;
      const rootTheta = Math.sqrt(state.inletTemperature / parameters.mapTemperature);
      const speedRatio = tipSpeed / (parameters.referenceTipSpeed * rootTheta);
      const head = usableHead(parameters, tipSpeed, speedRatio, state.inletTemperature);
      const onTheMap = mapFlow(parameters, head, speedRatio, point.pressureRatio, point.correctedFlowKgS);
      expect(onTheMap / point.correctedFlowKgS).toBeCloseTo(1, 6);
    });
});
