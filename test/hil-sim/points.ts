import type { OperatingPoint } from "../../hil-sim/steady/operating-point.ts";

/** Wide open throttle at an engine speed, sea level, 298 K. */
export function wideOpen(rpm: number): OperatingPoint {
  return {
    throttle: 1,
    bypass: 0,
    fuel: 1,
    engineSpeed: (rpm * Math.PI) / 30,
    ambientPressure: 101325,
    ambientTemperature: 298,
  };
}
