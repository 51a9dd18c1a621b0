import type { Count, Flag, Real } from "./types.ts";

/** What shapes the code: known when code is generated, so a branch that a spec does not choose is never printed. */
export interface Structure {
  /** Period of the slow step, s. */
  readonly stepS: Real;
  /** Period of the fast step, s. */
  readonly guardStepS: Real;

  readonly engineSpeedRate: Flag;
  readonly engineSpeedFilter: Flag;
  readonly acceleratorRate: Flag;
  readonly acceleratorFilter: Flag;
  readonly boostPressureRate: Flag;
  readonly boostPressureStuck: Flag;
  readonly boostPressureFilter: Flag;
  readonly ambientPressureRate: Flag;
  readonly ambientPressureFilter: Flag;
  readonly chargeTemperatureRate: Flag;
  readonly chargeTemperatureFilter: Flag;
  readonly boostCeilingRequestRate: Flag;
  readonly boostCeilingRequestFilter: Flag;
  readonly turboSpeedRate: Flag;
  readonly turboSpeedStuck: Flag;
  readonly turboSpeedFilter: Flag;

  readonly targetReference: "absolute" | "gauge" | "pressure_ratio";
  readonly airCompensation: Flag;
  readonly pressureRatioCeiling: Flag;
  readonly boostCeilingRequest: Flag;

  readonly feedforward: "none" | "over_pressure_ratio" | "over_target_pressure";
  readonly coordinate: "effective_area" | "opening";
  readonly schedule: "per_gauge_pressure" | "over_engine_speed" | "over_target_pressure" | "constant";
  readonly proportionalCurve: Flag;
  readonly integral: Flag;
  readonly integralCurve: Flag;
  readonly derivative: Flag;
  readonly derivativeCurve: Flag;
  readonly antiWindup: "conditional" | "back_calculation" | "none";

  readonly overspeedGuard: Flag;
  readonly proportionalGuard: Flag;
  readonly trip: Flag;
  /** Fast steps over which the turbo's acceleration is measured; sizes the history. */
  readonly accelerationSteps: Count;
}
