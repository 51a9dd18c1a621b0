import type { ControllerSpec, Coordinate, Gain } from "../../spec/index.ts";
import {
  compare,
  LIMITS,
  put,
  putCurve,
  putDerived,
  putTable,
  putUnused,
  putUnusedCurve,
  putUnusedTable,
  type Sheet,
} from "./sheet.ts";

const coordinateUnit = (coordinate: Coordinate): string =>
  coordinate === "effective_area" ? "mm2" : "ratio";

/** Target table, air compensation, ceilings, slew. */
export function putTarget(sheet: Sheet, controller: ControllerSpec): void {
  const { target } = controller;
  const units = {
    rows: "ratio",
    columns: "rpm",
    values:
      target.reference === "pressure_ratio" ? "1" : target.reference === "gauge" ? "kPa gauge" : "kPa abs",
  };
  putTable(sheet, "targetBoost", target.boost, units, { low: 0, high: LIMITS.pressure.high });
  const air = target.airCompensation;
  if (air === undefined) {
    putUnused(
      sheet,
      "airReferenceTemperatureK",
      "airReferencePressureKpa",
      "airStrengthRatio",
      "airAtMostRatio",
    );
  } else {
    put(sheet, "airReferenceTemperatureK", air.referenceTemperature, "K", LIMITS.temperature);
    put(sheet, "airReferencePressureKpa", air.referencePressure, "kPa abs", LIMITS.pressure);
    put(sheet, "airStrengthRatio", air.strength, "ratio", { low: 0, high: 2 });
    put(sheet, "airAtMostRatio", air.atMost, "ratio", { low: 0, high: 1 });
  }
  put(sheet, "boostCeilingKpa", target.ceiling, "kPa abs", LIMITS.pressure);
  if (target.pressureRatioCeiling === undefined) {
    putUnused(sheet, "pressureRatioCeiling");
  } else {
    put(sheet, "pressureRatioCeiling", target.pressureRatioCeiling, "1", { low: 1, high: 1000 });
  }
  put(sheet, "leastBoostKpa", target.leastBoost, "kPa", LIMITS.notNegative);
  put(sheet, "targetRiseKpaPerS", target.slewRise, "kPa/s", LIMITS.notNegative);
  put(sheet, "targetFallKpaPerS", target.slewFall, "kPa/s", LIMITS.notNegative);
}

/** The gate's area curve and the feedforward table. */
export function putFeedforward(sheet: Sheet, controller: ControllerSpec): void {
  if (controller.wastegateArea === undefined) {
    putUnusedCurve(sheet, "gateArea");
  } else {
    const units = { axis: "ratio", values: "mm2" };
    putCurve(sheet, "gateArea", controller.wastegateArea, units, LIMITS.notNegative, true);
  }
  if (controller.feedforward === undefined) {
    putUnusedTable(sheet, "feedforward");
  } else {
    const rows = controller.feedforward.rowsOver === "pressure_ratio" ? "1" : "kPa abs";
    const values = coordinateUnit(controller.feedback.coordinate);
    putTable(
      sheet,
      "feedforward",
      controller.feedforward,
      { rows, columns: "rpm", values },
      LIMITS.notNegative,
    );
  }
}

function putGain(sheet: Sheet, field: string, gain: Gain | undefined, unit: string, axisUnit: string): void {
  const curveField = `${field}Curve`;
  if (gain === undefined) {
    putUnused(sheet, field);
    putUnusedCurve(sheet, curveField);
  } else if (gain.kind === "number") {
    put(sheet, field, gain.quantity, unit, LIMITS.notNegative);
    putUnusedCurve(sheet, curveField);
  } else {
    putUnused(sheet, field);
    putCurve(sheet, curveField, gain.curve, { axis: axisUnit, values: unit }, LIMITS.notNegative);
  }
}

/** Gains, derivative filter, trim limits, anti-windup. */
export function putFeedback(sheet: Sheet, controller: ControllerSpec): void {
  const { feedback } = controller;
  const base = coordinateUnit(feedback.coordinate);
  const perKpa = feedback.schedule === "per_gauge_pressure" ? "" : "/kPa";
  const axisUnit = feedback.schedule === "over_target_pressure" ? "kPa abs" : "rpm";
  putGain(sheet, "proportionalGain", feedback.proportional, `${base}${perKpa}`, axisUnit);
  putGain(sheet, "integralGain", feedback.integral, `${base}${perKpa}/s`, axisUnit);
  putGain(sheet, "derivativeGain", feedback.derivative, `${base}*s${perKpa}`, axisUnit);
  if (feedback.derivativeFilter === undefined) {
    putDerived(sheet, "derivativeFilterS", 0, "s", LIMITS.seconds);
  } else {
    put(sheet, "derivativeFilterS", feedback.derivativeFilter, "s", LIMITS.seconds);
  }
  put(sheet, "setpointWeightRatio", feedback.setpointWeight, "ratio", { low: 0, high: 2 });
  put(sheet, "trimLow", feedback.trimLimits.low, base, LIMITS.any);
  put(sheet, "trimHigh", feedback.trimLimits.high, base, LIMITS.any);
  compare(sheet, "trimHigh", "above", "trimLow");

  const windup = feedback.antiWindup;
  if (windup.method === "conditional") {
    const unit = feedback.schedule === "per_gauge_pressure" ? "ratio" : "kPa";
    put(sheet, "windupBand", windup.band, unit, LIMITS.notNegative);
    put(sheet, "windupStillBelow", windup.stillBelow, `${unit}/s`, LIMITS.notNegative);
  } else {
    putUnused(sheet, "windupBand", "windupStillBelow");
  }
  if (windup.method === "back_calculation") {
    put(sheet, "trackingTimeS", windup.trackingTime, "s", { low: 1e-6, high: LIMITS.seconds.high });
  } else {
    putUnused(sheet, "trackingTimeS");
  }
}

/** Range and slew of the gate, its safe and rest openings. */
export function putActuator(sheet: Sheet, controller: ControllerSpec): void {
  const { actuator } = controller;
  put(sheet, "openingLowRatio", actuator.opening.low, "ratio", LIMITS.ratio);
  put(sheet, "openingHighRatio", actuator.opening.high, "ratio", LIMITS.ratio);
  compare(sheet, "openingHighRatio", "above", "openingLowRatio");
  put(sheet, "slewOpenRatioPerS", actuator.slewOpen, "1/s", LIMITS.notNegative);
  put(sheet, "slewCloseRatioPerS", actuator.slewClose, "1/s", LIMITS.notNegative);
  put(sheet, "safeOpeningRatio", actuator.safeOpening, "ratio", LIMITS.ratio);
  put(sheet, "restOpeningRatio", actuator.restOpening, "ratio", LIMITS.ratio);
  for (const opening of ["safeOpeningRatio", "restOpeningRatio"]) {
    compare(sheet, opening, "notBelow", "openingLowRatio");
    compare(sheet, opening, "notAbove", "openingHighRatio");
  }
}
