import type { Lowered } from "../../generator/lowered.ts";
import type { ControllerPort } from "../../hil-sim/index.ts";
import { type Calibration, initialise, type Structure, stepBoost, stepGuard } from "../../runtime/index.ts";
import { copyFastOutput, copySlowOutput, newControllerInput, newControllerOutput } from "./port-values.ts";
import { clearPosedTarget, liftCeilings, type TargetCalibration, writePosedTarget } from "./pose-target.ts";
import { newExchange, newFastOutput, newFastState, newSlowOutput, newSlowState } from "./runtime-memory.ts";

/** The runtime itself as a controller, in double precision, whatever precision the spec asks for. */
export function portFromRuntime(lowered: Pick<Lowered, "structure" | "calibration">): ControllerPort {
  const structure = lowered.structure as unknown as Structure;
  const generated = lowered.calibration as unknown as Calibration & TargetCalibration;
  const calibration = structuredClone(generated);
  const slow = newSlowState();
  const fast = newFastState(structure.accelerationSteps);
  const exchange = newExchange();
  const slowOutput = newSlowOutput();
  const fastOutput = newFastOutput();
  const input = newControllerInput();
  const output = newControllerOutput();
  const posed = { kilopascal: Number.NaN, writtenFor: Number.NaN };
  return {
    input,
    output,
    step: structure.stepS,
    guardStep: structure.guardStepS,
    reset() {
      Object.assign(calibration, structuredClone(generated));
      clearPosedTarget(posed);
      initialise(structure, calibration, slow, fast, exchange);
      Object.assign(output, newControllerOutput());
    },
    stepGuard() {
      stepGuard(structure, calibration, fast, exchange, input, fastOutput);
      copyFastOutput(fastOutput, output);
    },
    stepBoost() {
      writePosedTarget(
        posed,
        calibration,
        structure.targetReference,
        input.ambientPressureKpa,
        (value) => value,
      );
      stepBoost(structure, calibration, slow, exchange, input, slowOutput);
      copySlowOutput(slowOutput, output);
    },
    poseTarget(kilopascal) {
      posed.kilopascal = kilopascal;
    },
    liftCeilings() {
      liftCeilings(calibration);
    },
  };
}
