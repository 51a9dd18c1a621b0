import type { ControllerSpec, SignalName } from "../../spec/index.ts";
import { stepsIn } from "./steps.ts";

/** Value of every field of the runtime's `Structure`: the compile-time choices that a spec makes. */
export function structureOf(controller: ControllerSpec) {
  const { feedback, feedforward, overspeedGuard, signals, target } = controller;
  const floor = overspeedGuard?.proportional;
  const rate = (name: SignalName): boolean => signals[name]?.fault.rateAbove !== undefined;
  const stuck = (name: SignalName): boolean => signals[name]?.fault.stuckFor !== undefined;
  const filter = (name: SignalName): boolean => signals[name]?.filter !== undefined;
  return {
    stepS: controller.step.value,
    guardStepS: controller.guardStep.value,
    engineSpeedRate: rate("engine_speed"),
    engineSpeedFilter: filter("engine_speed"),
    acceleratorRate: rate("accelerator"),
    acceleratorFilter: filter("accelerator"),
    boostPressureRate: rate("boost_pressure"),
    boostPressureStuck: stuck("boost_pressure"),
    boostPressureFilter: filter("boost_pressure"),
    ambientPressureRate: rate("ambient_pressure"),
    ambientPressureFilter: filter("ambient_pressure"),
    chargeTemperatureRate: rate("charge_temperature"),
    chargeTemperatureFilter: filter("charge_temperature"),
    boostCeilingRequestRate: rate("boost_ceiling_request"),
    boostCeilingRequestFilter: filter("boost_ceiling_request"),
    turboSpeedRate: rate("turbo_speed"),
    turboSpeedStuck: stuck("turbo_speed"),
    turboSpeedFilter: filter("turbo_speed"),
    targetReference: target.reference,
    airCompensation: target.airCompensation !== undefined,
    pressureRatioCeiling: target.pressureRatioCeiling !== undefined,
    boostCeilingRequest: signals.boost_ceiling_request !== undefined,
    feedforward:
      feedforward === undefined
        ? "none"
        : feedforward.rowsOver === "pressure_ratio"
          ? "over_pressure_ratio"
          : "over_target_pressure",
    coordinate: feedback.coordinate,
    schedule: feedback.schedule,
    proportionalCurve: feedback.proportional.kind === "curve",
    integral: feedback.integral !== undefined,
    integralCurve: feedback.integral?.kind === "curve",
    derivative: feedback.derivative !== undefined,
    derivativeCurve: feedback.derivative?.kind === "curve",
    antiWindup: feedback.antiWindup.method,
    overspeedGuard: overspeedGuard !== undefined,
    proportionalGuard: floor !== undefined,
    trip: overspeedGuard?.trip !== undefined,
    accelerationSteps: floor ? Math.max(1, stepsIn(floor.accelerationWindow, controller.guardStep)) : 1,
  };
}
