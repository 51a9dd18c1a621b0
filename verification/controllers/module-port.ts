import type { ControllerModule } from "../../generator/index.ts";
import {
  type ControllerInput,
  type ControllerOutput,
  type ControllerPort,
  MODES,
} from "../../hil-sim/index.ts";
import type { PressureReference } from "../../spec/index.ts";
import { newControllerInput, newControllerOutput } from "./port-values.ts";
import { posedTarget } from "./pose-target.ts";

/** What the port must know of the spec beside the module itself. */
export interface PortFacts {
  /** Seconds. */
  readonly step: number;
  readonly guardStep: number;
  readonly precision: "float32" | "float64";
  readonly targetReference: PressureReference;
}

/** The structs of a generated module, by the names it prints; fields that a spec does not use are absent. */
interface SlowInput {
  engine_speed_rpm: number;
  accelerator_ratio: number;
  boost_pressure_kpa: number;
  ambient_pressure_kpa: number;
  charge_temperature_k: number;
  boost_ceiling_request_kpa: number;
}
interface SlowOutput {
  readonly boost_wanted_kpa: number;
  readonly boost_target_kpa: number;
  readonly mode: (typeof MODES)[number];
  readonly feedforward_term?: number;
  readonly proportional_term?: number;
  readonly integral_term?: number;
  readonly derivative_term?: number;
}
interface FastOutput {
  readonly wastegate_command_ratio: number;
  readonly torque_limit_ratio: number;
  readonly over_limit?: boolean;
  readonly guard_active?: boolean;
  readonly fail_safe: boolean;
  readonly guard_floor?: number;
}

/**
 * A generated module as a controller, in its own precision. Inputs are rounded to it, as an ECU's converters deliver
 * them; outputs are taken as they are.
 */
export function portFromModule(module: ControllerModule, facts: PortFacts): ControllerPort {
  const present = new Set(module.layout.structs.map(({ name }) => name));
  const objects = Object.fromEntries(
    STRUCTS.map((name) => [name, present.has(name) ? module.create(name) : {}]),
  );
  const calibration = module.createCalibration();
  const structs = { ...objects, Calibration: calibration };
  const initialise = module.bind("initialise", structs);
  const runSlow = module.bind("stepBoost", structs);
  const runFast = module.bind("stepGuard", structs);
  const round = facts.precision === "float32" ? Math.fround : (value: number) => value;
  const slowInput = objects.SlowInput as unknown as SlowInput;
  const fastInput = objects.FastInput as unknown as { turbo_speed_rpm: number };
  const slowOutput = objects.SlowOutput as unknown as SlowOutput;
  const fastOutput = objects.FastOutput as unknown as FastOutput;
  const input = newControllerInput();
  const output = newControllerOutput();
  const target = posedTarget(
    {
      cells: calibration.target_boost_values as number[],
      holder: calibration,
      airAtMost: "air_at_most_ratio",
      ceiling: "boost_ceiling_kpa",
      ratioCeiling: "pressure_ratio_ceiling",
    },
    facts.targetReference,
    round,
  );
  return {
    input,
    output,
    step: facts.step,
    guardStep: facts.guardStep,
    reset() {
      target.restore();
      initialise();
      Object.assign(output, newControllerOutput());
    },
    stepGuard() {
      fastInput.turbo_speed_rpm = round(input.turboSpeedRpm);
      runFast();
      takeFastOutput(fastOutput, output);
    },
    stepBoost() {
      target.write(input.ambientPressureKpa);
      giveSlowInput(input, slowInput, round);
      runSlow();
      takeSlowOutput(slowOutput, output);
    },
    poseTarget: target.pose,
    liftCeilings: target.liftCeilings,
  };
}

const STRUCTS = ["SlowState", "FastState", "Exchange", "SlowInput", "FastInput", "SlowOutput", "FastOutput"];

function giveSlowInput(from: ControllerInput, to: SlowInput, round: (value: number) => number): void {
  to.engine_speed_rpm = round(from.engineSpeedRpm);
  to.accelerator_ratio = round(from.acceleratorRatio);
  to.boost_pressure_kpa = round(from.boostPressureKpa);
  to.ambient_pressure_kpa = round(from.ambientPressureKpa);
  to.charge_temperature_k = round(from.chargeTemperatureK);
  to.boost_ceiling_request_kpa = round(from.boostCeilingRequestKpa);
}

function takeSlowOutput(from: SlowOutput, to: ControllerOutput): void {
  to.boostWantedKpa = from.boost_wanted_kpa;
  to.boostTargetKpa = from.boost_target_kpa;
  to.mode = MODES.indexOf(from.mode);
  to.feedforwardTerm = from.feedforward_term ?? 0;
  to.proportionalTerm = from.proportional_term ?? 0;
  to.integralTerm = from.integral_term ?? 0;
  to.derivativeTerm = from.derivative_term ?? 0;
}

function takeFastOutput(from: FastOutput, to: ControllerOutput): void {
  to.wastegateCommandRatio = from.wastegate_command_ratio;
  to.torqueLimitRatio = from.torque_limit_ratio;
  to.tripped = from.over_limit ?? false;
  to.guardActive = from.guard_active ?? false;
  to.failSafe = from.fail_safe;
  to.guardFloor = from.guard_floor ?? 0;
}
