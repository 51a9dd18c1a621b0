import type { PlantParameters } from "../plant/plant-parameters.ts";
import type { PlantState } from "../plant/plant-state.ts";
import { equilibriumAt, equilibriumHolding } from "./equilibrium.ts";
import type { OperatingPoint } from "./operating-point.ts";

/** Steady boost Pa with the gate fully open and closed. */
export interface ReachableBoost {
  readonly lowest: number;
  readonly highest: number;
  /** False: an end has no equilibrium (surge); its figure is where the search ended. */
  readonly converged: boolean;
}

/** The gate that holds a boost in steady state, or why none does. `state` is the equilibrium at `opening`. */
export type OpeningForBoost =
  | { readonly kind: "held"; readonly opening: number; readonly state: PlantState }
  | {
      readonly kind: "out of reach";
      /** The end stop that comes nearest. */
      readonly opening: 0 | 1;
      readonly state: PlantState;
      readonly reachable: ReachableBoost;
    }
  /** No equilibrium holds it; `state` is where the search ended. */
  | { readonly kind: "unsteady"; readonly opening: number; readonly state: PlantState };

/** Steady boost range of the gate at a point. */
export function reachableBoost(parameters: PlantParameters, point: OperatingPoint): ReachableBoost {
  const open = equilibriumAt(parameters, point, 1);
  const closed = equilibriumAt(parameters, point, 0);
  return {
    lowest: open.state.boostPressure,
    highest: closed.state.boostPressure,
    converged: open.converged && closed.converged,
  };
}

/** Opening that holds `boost` Pa abs at a point. Where two openings do (near the closed stop at high speed), either may be found. */
export function openingForBoost(
  parameters: PlantParameters,
  point: OperatingPoint,
  boost: number,
): OpeningForBoost {
  const { state, converged } = equilibriumHolding(parameters, point, boost);
  const opening = state.wastegateOpening;
  if (!converged) return { kind: "unsteady", opening, state };
  if (Math.abs(state.boostPressure - boost) <= 1e-6 * boost) return { kind: "held", opening, state };
  return {
    kind: "out of reach",
    opening: opening > 0.5 ? 1 : 0,
    state,
    reachable: reachableBoost(parameters, point),
  };
}
