import type { Calibration } from "./calibration.ts";
import { interpolateCurve } from "./interpolate.ts";
import type { Structure } from "./structure.ts";
import type { Real } from "./types.ts";

/** Opening within the actuator's range. Not a number opens: the safe side of a wastegate is open. */
export function limitOpening(calibration: Calibration, openingRatio: Real): Real {
  let limited: Real = calibration.openingHighRatio;
  if (openingRatio < calibration.openingLowRatio) {
    limited = calibration.openingLowRatio;
  } else if (openingRatio <= calibration.openingHighRatio) {
    limited = openingRatio;
  }
  return limited;
}

/** Opening that gives a value of the feedback coordinate: itself, or the gate's area curve read backwards. */
export function openingFor(structure: Structure, calibration: Calibration, coordinate: Real): Real {
  let opening: Real = coordinate;
  if (structure.coordinate === "effective_area") {
    opening = interpolateCurve(calibration.gateArea.values, calibration.gateArea.axis, coordinate);
  }
  return limitOpening(calibration, opening);
}

/** Feedback coordinate of an opening: itself, or the gate's effective area, mm2. */
export function coordinateOf(structure: Structure, calibration: Calibration, openingRatio: Real): Real {
  let coordinate: Real = openingRatio;
  if (structure.coordinate === "effective_area") {
    coordinate = interpolateCurve(calibration.gateArea.axis, calibration.gateArea.values, openingRatio);
  }
  return coordinate;
}

/** Fully open in the feedback coordinate: 1, or the gate's largest effective area, mm2. */
export function highestCoordinate(structure: Structure, calibration: Calibration): Real {
  let highest: Real = 1;
  if (structure.coordinate === "effective_area") {
    highest = calibration.gateArea.values[calibration.gateArea.values.length - 1];
  }
  return highest;
}
