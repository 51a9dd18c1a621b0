// Compressor, one turbo: static map by an ellipse speed line, Euler work, surge branch.
//   U   m/s  tip speed r om            theta = T1/Tref          u = U/(Uref sqrt(theta))  corrected speed ratio
//   W   kg/s corrected flow            PR = p2/p1               s = (PR - PRk)/(PRz - PRk)
//   z: zero-slope point of the speed line (surge), k: choke, 0: zero flow
// (7)  PRz = (1 + psi_z m U^2/(cp T1))^3.5, PR0 with psi_0;  m = max(1 - pm u^4, 0.3)
// (8)  Wz = wz1 u + wz2 u^2;  Wk = wk0 + wk1 u + wk2 u^2;  PRk = pk0 + pk1 u^2
// (10) W = Wz + (Wk - Wz) q;  q = 1 (s <= 0), sqrt(1 - s^2), beyond sL the tangent line;  W >= -krv Wk
// (11) surge: PR > PR0 and W_now < Wz clip((PR - PR0)/(PRz - PR0), 0, 1)  ->  W = -krv Wk sqrt(1 - PR0/PR)
// (12) v = b0 U - b1 W Uref sqrt(theta); specific work U v
// (13) torque = |Wc| rc v                    (14) T2 = T1 + max(U v, 0)/cp
// limits: standstill gives PRz = PR0 = 1 and a plain restriction; PR <= PRk gives the choke flow
// source: ellipse speed lines Llamas & Eriksson 2017 (J. Eng. Gas Turbines Power 139(1) 012601), Leufven 2010;
//         surge after Greitzer 1976 (from memory). Mach loss (7) and the relaxed branches (10)-(11) are our own.
import { HEAT_CAPACITY_AIR, powerSevenHalves } from "./gas.ts";
import type { PlantParameters } from "./plant-parameters.ts";

/** Largest head m U²/(cp T1) left by the Mach loss of (7), bare number. */
export function usableHead(
  parameters: PlantParameters,
  tipSpeed: number,
  speedRatio: number,
  temperature: number,
): number {
  const squared = speedRatio * speedRatio;
  const left = 1 - parameters.machLoss * squared * squared;
  return (Math.max(left, 0.3) * tipSpeed * tipSpeed) / (HEAT_CAPACITY_AIR * temperature);
}

/** Corrected flow kg/s at the top of the speed line. */
export function peakFlow(parameters: PlantParameters, speedRatio: number): number {
  return (parameters.peakFlowLinear + parameters.peakFlowQuadratic * speedRatio) * speedRatio;
}

/** Corrected flow kg/s at choke. */
export function chokeFlow(parameters: PlantParameters, speedRatio: number): number {
  return (
    parameters.chokeFlowBase +
    (parameters.chokeFlowLinear + parameters.chokeFlowQuadratic * speedRatio) * speedRatio
  );
}

/** Static map: corrected flow kg/s that the compressor tends to at a pressure ratio, (10) and (11). */
export function mapFlow(
  parameters: PlantParameters,
  head: number,
  speedRatio: number,
  pressureRatio: number,
  flowNow: number,
): number {
  const peakRatio = powerSevenHalves(1 + parameters.peakHead * head);
  const shutoffRatio = powerSevenHalves(1 + parameters.shutoffHead * head);
  const surgeFlow = peakFlow(parameters, speedRatio);
  const choke = chokeFlow(parameters, speedRatio);
  if (pressureRatio > shutoffRatio) {
    const depth = (pressureRatio - shutoffRatio) / (peakRatio - shutoffRatio + 1e-6);
    if (flowNow < surgeFlow * Math.min(depth, 1)) {
      return -parameters.reverseFlow * choke * Math.sqrt(1 - shutoffRatio / pressureRatio);
    }
  }
  const chokeRatio =
    parameters.chokePressureRatioBase + parameters.chokePressureRatioQuadratic * speedRatio * speedRatio;
  const height = (pressureRatio - chokeRatio) / (peakRatio - chokeRatio);
  const flow = surgeFlow + (choke - surgeFlow) * ellipse(height, parameters.tangentFrom);
  const reverse = -parameters.reverseFlow * choke;
  return Math.max(flow, reverse);
}

/** q of (10). */
function ellipse(height: number, tangentFrom: number): number {
  if (height <= 0) return 1;
  if (height < tangentFrom) return Math.sqrt(1 - height * height);
  const there = Math.sqrt(1 - tangentFrom * tangentFrom);
  return there - (tangentFrom / there) * (height - tangentFrom);
}

/** v of (12), m/s: torque is |Wc| rc v, specific work is U v; `flow` corrected, `scale` Uref √θ. */
export function workVelocity(
  parameters: PlantParameters,
  tipSpeed: number,
  flow: number,
  scale: number,
): number {
  return parameters.workSlip * tipSpeed - parameters.workSlope * flow * scale;
}
