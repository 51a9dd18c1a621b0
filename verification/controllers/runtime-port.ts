import type { Lowered } from "../../generator/index.ts";
import type { ControllerPort } from "../../hil-sim/index.ts";
import { type Calibration, initialise, type Structure, stepBoost, stepGuard } from "../../runtime/index.ts";
import { copyFastOutput, copySlowOutput, newControllerInput, newControllerOutput } from "./port-values.ts";
import { posedTarget } from "./pose-target.ts";
import { newExchange, newFastOutput, newFastState, newSlowOutput, newSlowState } from "./runtime-memory.ts";

/** The runtime itself as a controller, in double precision, whatever precision the spec asks for. */
export function portFromRuntime(lowered: Pick<Lowered, "structure" | "calibration">): ControllerPort {
  const structure = lowered.structure as unknown as Structure;
  const calibration = structuredClone(lowered.calibration) as unknown as Calibration;
  const slow = newSlowState();
  const fast = newFastState(structure.accelerationSteps);
  const exchange = newExchange();
  const slowOutput = newSlowOutput();
  const fastOutput = newFastOutput();
  const input = newControllerInput();
  const output = newControllerOutput();
  const target = posedTarget(
    {
      cells: calibration.targetBoost.values as number[],
      holder: calibration as unknown as Record<string, unknown>,
      airAtMost: "airAtMostRatio",
      ceiling: "boostCeilingKpa",
      ratioCeiling: "pressureRatioCeiling",
    },
    structure.targetReference,
    (value) => value,
  );
  return {
    input,
    output,
    step: structure.stepS,
    guardStep: structure.guardStepS,
    reset() {
      target.restore();
      initialise(structure, calibration, slow, fast, exchange);
      Object.assign(output, newControllerOutput());
    },
    stepGuard() {
      stepGuard(structure, calibration, fast, exchange, input, fastOutput);
      copyFastOutput(fastOutput, output);
    },
    stepBoost() {
      target.write(input.ambientPressureKpa);
      stepBoost(structure, calibration, slow, exchange, input, slowOutput);
      copySlowOutput(slowOutput, output);
    },
    poseTarget: target.pose,
    liftCeilings: target.liftCeilings,
  };
}
