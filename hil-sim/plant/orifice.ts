// Orifice, bidirectional, with the elliptic flow function of pneumatics instead of the isentropic one.
//   area  m2     effective area                 from, to  Pa  pressures; flow is positive from -> to
//   T     K      temperature of the gas         W  kg/s       mass flow
//   r = p_low / p_high                          b = 0.53      critical ratio
// (1) W = area p_high K f(r) / sqrt(T)
//     f = 1 for r <= b,  sqrt(1 - ((r - b)/(1 - b))^2) up to r = 0.94,  a straight line to 0 at r = 1 above
//     K = 0.0404, that is sqrt(gamma/R) (2/(gamma+1))^((gamma+1)/(2(gamma-1))) for gamma 1.4 and R 287,
//     0.0404184, rounded as handbooks print it
// error    against the isentropic flow function, as swept in test/hil-sim/plant/orifice.test.ts
// limits: equal pressures give no flow; r <= b is choked, the downstream pressure has no influence
// source: ISO 6358-1:2013 (form of the function); the linear zone is our own: it bounds the stiffness at r = 1

export const CRITICAL_RATIO = 0.53;
export const LINEAR_ABOVE = 0.94;
/** √K·s/m. */
export const CHOKED_FLOW = 0.0404;

const ELLIPSE = 1 / (1 - CRITICAL_RATIO);
const AT_LINEAR = (LINEAR_ABOVE - CRITICAL_RATIO) * ELLIPSE;
/** Slope -df/dr of the linear zone, its steepest anywhere: bounds the plant's fastest eigenvalue. */
export const STEEPEST_SLOPE = Math.sqrt(1 - AT_LINEAR * AT_LINEAR) / (1 - LINEAR_ABOVE);

/** f(r) of (1), 1 when choked, 0 at r = 1. */
export function flowFunction(ratio: number): number {
  if (ratio <= CRITICAL_RATIO) return 1;
  if (ratio >= LINEAR_ABOVE) return STEEPEST_SLOPE * (1 - ratio);
  const x = (ratio - CRITICAL_RATIO) * ELLIPSE;
  return Math.sqrt(1 - x * x);
}

/** Mass flow kg/s, positive from `from` to `to`; `rootTemperature` is the square root of the gas temperature. */
export function orificeFlow(area: number, from: number, to: number, rootTemperature: number): number {
  if (area <= 0) return 0;
  const capacity = (area * CHOKED_FLOW) / rootTemperature;
  return from >= to ? capacity * from * flowFunction(to / from) : -capacity * to * flowFunction(from / to);
}
