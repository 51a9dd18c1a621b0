import type { ControllerInput, ControllerOutput, ControllerPort } from "../../hil-sim/controller-port.ts";

const newInput = (): ControllerInput => ({
  engineSpeedRpm: 0.5,
  acceleratorRatio: 0.5,
  boostPressureKpa: 0.5,
  ambientPressureKpa: 0.5,
  chargeTemperatureK: 0.5,
  inletTemperatureK: 0.5,
  manifoldPressureKpa: 0.5,
  boostCeilingRequestKpa: 0.5,
  turboSpeedRpm: 0.5,
});

const newOutput = (): ControllerOutput => ({
  wastegateCommandRatio: 0.5,
  torqueLimitRatio: 1,
  bypassCommandRatio: 0,
  fuelCutPermitted: false,
  boostWantedKpa: 0.5,
  boostTargetKpa: 0.5,
  mode: 2,
  tripped: false,
  guardActive: false,
  failSafe: false,
  feedforwardTerm: 0,
  proportionalTerm: 0,
  integralTerm: 0,
  derivativeTerm: 0,
  guardFloor: 0,
});

/** A port that keeps the gate where it is told and notes what it was asked to do. */
export function fixedPort(change: Partial<ControllerOutput> = {}) {
  const calls: string[] = [];
  const seen: ControllerInput[] = [];
  const output = Object.assign(newOutput(), change);
  const port = {
    input: newInput(),
    output,
    step: 0.005,
    guardStep: 0.002,
    reset: () => calls.push("reset"),
    stepGuard: () => calls.push("guard"),
    stepBoost: () => {
      calls.push("boost");
      seen.push({ ...port.input });
    },
    poseTarget: (kilopascal: number) => calls.push(`target ${kilopascal}`),
    liftCeilings: () => calls.push("ceilings"),
    calls,
    seen,
  };
  return port satisfies ControllerPort;
}

/** A plain PI on the opening with an opening floor from turbo speed: enough to close the loop, no product controller. */
export function plainPort(speedLimitRpm: number): ControllerPort {
  const input = newInput();
  const output = newOutput();
  const held = { integral: 0.3, target: 150.5, floor: 0.5 };
  return {
    input,
    output,
    step: 0.005,
    guardStep: 0.002,
    reset: () => {
      held.integral = 0.3;
    },
    stepGuard: () => {
      const over = (input.turboSpeedRpm - speedLimitRpm) * 4e-5;
      held.floor = over > 0 ? Math.min(over, 1) : 0;
      output.wastegateCommandRatio = Math.max(output.integralTerm, held.floor);
      output.guardActive = held.floor > 0;
    },
    stepBoost: () => {
      const error = input.boostPressureKpa - held.target;
      held.integral = Math.min(Math.max(held.integral + error * 1.5e-5, 0), 1);
      output.integralTerm = Math.min(Math.max(held.integral + 0.004 * error, 0), 1);
      output.boostWantedKpa = held.target;
      output.boostTargetKpa = held.target;
    },
    poseTarget: (kilopascal) => {
      held.target = kilopascal;
    },
    liftCeilings: () => undefined,
  };
}
