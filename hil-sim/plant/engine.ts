// Engine: mean-value air flow, exhaust gas temperature, torque.
//   Vd m3 displacement   we rad/s speed   pim, pem Pa   Tim K intake gas   We, Wfuel kg/s   Teo, Tg K   Te N m
// (17) We = ev0(we) Vd we/(4 pi R Tim) max((1 + c) pim - c pem, 0),  c = 1/(1.4 (rcomp - 1))
// (18) Wfuel = fuel We/(AFR lambda)
// (19) Teo = fuel (Te0 + Te1 We/(We + We1)) + (1 - fuel)(Tim + dTm)
// (20) eps_w = Wh/(Weo + Wh) is the share of heat exchanged with the wall
// (21) Te = eta_i q Wfuel/we - Vd (pem - pim)/(4 pi) - (tf0 + tf1 we + tf2 we^2), we >= 10 rad/s in the first term
// limits: back-pressure lowers the flow to 0 and no further; no fuel leaves pumping and friction
// source: residual-gas law after Heywood 1988, mean-value form after Hendricks & Sorenson SAE 900616,
//         exhaust temperature after Eriksson SAE 2002-01-0374 (all from memory). The form of (20) is our own.
import { GAS_CONSTANT } from "./gas.ts";
import type { PlantParameters } from "./plant-parameters.ts";

const FOUR_PI = 12.566370614359172;

/** Air flow kg/s into the engine. */
export function engineAirFlow(
  parameters: PlantParameters,
  speed: number,
  intakePressure: number,
  exhaustPressure: number,
  intakeTemperature: number,
): number {
  const residual = 1 / (1.4 * (parameters.compressionRatio - 1));
  const filling = (1 + residual) * intakePressure - residual * exhaustPressure;
  if (filling <= 0) return 0;
  const efficiency =
    parameters.volumetricEfficiencyBase +
    (parameters.volumetricEfficiencyLinear + parameters.volumetricEfficiencyQuadratic * speed) * speed;
  return (
    (efficiency * parameters.displacement * speed * filling) / (FOUR_PI * GAS_CONSTANT * intakeTemperature)
  );
}

/** Exhaust temperature K at the port. */
export function portTemperature(
  parameters: PlantParameters,
  fuel: number,
  airFlow: number,
  intakeTemperature: number,
): number {
  const fired =
    parameters.exhaustTemperatureBase +
    (parameters.exhaustTemperatureRise * airFlow) / (airFlow + parameters.exhaustTemperatureFlow);
  return fuel * fired + (1 - fuel) * (intakeTemperature + parameters.motoredRise);
}

/** Torque N·m at the crankshaft. */
export function engineTorque(
  parameters: PlantParameters,
  speed: number,
  fuelFlow: number,
  intakePressure: number,
  exhaustPressure: number,
): number {
  const indicated =
    (parameters.indicatedEfficiency * parameters.heatingValue * fuelFlow) / Math.max(speed, 10);
  const pumping = (parameters.displacement * (exhaustPressure - intakePressure)) / FOUR_PI;
  const friction =
    parameters.frictionBase + (parameters.frictionLinear + parameters.frictionQuadratic * speed) * speed;
  return indicated - pumping - friction;
}
