import type { ControllerSpec, OverspeedGuardSpec, TripSpec } from "../../spec/index.ts";
import { compare, LIMITS, put, putDerived, putSteps, putUnused, type Sheet } from "./sheet.ts";

function putLimits(sheet: Sheet, guard: OverspeedGuardSpec | undefined): void {
  if (guard === undefined) {
    putUnused(sheet, "speedLimitRpm", "speedCeilingRpm");
    return;
  }
  const { limit, margin } = guard;
  put(sheet, "speedLimitRpm", limit, "rpm", LIMITS.speed);
  putDerived(sheet, "speedCeilingRpm", limit.value * (1 - margin.value), "rpm", LIMITS.speed, {
    written: `${limit.written} less ${margin.written}`,
    at: margin.at,
  });
  compare(sheet, "speedCeilingRpm", "notAbove", "speedLimitRpm");
}

function putProportional(sheet: Sheet, guard: OverspeedGuardSpec | undefined, base: string): void {
  const floor = guard?.proportional;
  if (floor === undefined) {
    putUnused(
      sheet,
      "guardLeadS",
      "guardGainPerRpm",
      "guardIntegralRatePerS",
      "guardSafePressureRatio",
      "guardTargetReductionKpaPerRpm",
      "guardTargetReleaseKpaPerS",
    );
    // without a floor, the band in which a reading above the range counts as over the limit starts at the ceiling
    sheet.values.guardReferenceSpeedRpm = sheet.values.speedCeilingRpm;
    sheet.info.guardReferenceSpeedRpm = sheet.info.speedCeilingRpm;
    return;
  }
  put(sheet, "guardLeadS", floor.lead, "s", LIMITS.seconds);
  put(sheet, "guardReferenceSpeedRpm", floor.referenceSpeed, "rpm", LIMITS.speed);
  put(sheet, "guardGainPerRpm", floor.gain, `${base}/rpm`, LIMITS.notNegative);
  put(sheet, "guardIntegralRatePerS", floor.integralRate, "1/s", LIMITS.notNegative);
  put(sheet, "guardSafePressureRatio", floor.safePressureRatio, "1", { low: 1, high: 1000 });
  put(sheet, "guardTargetReductionKpaPerRpm", floor.targetReduction, "kPa/rpm", LIMITS.notNegative);
  put(sheet, "guardTargetReleaseKpaPerS", floor.targetRelease, "kPa/s", LIMITS.notNegative);
}

function putTrip(sheet: Sheet, controller: ControllerSpec, trip: TripSpec | undefined): void {
  if (trip === undefined) {
    putUnused(
      sheet,
      "tripAfterSteps",
      "tripReleaseBelowRpm",
      "tripReleaseAfterSteps",
      "tripAcceleratorBelowRatio",
      "tripOrAfterSteps",
    );
    // over the mechanical limit torque is cut as in fail-safe even when the spec has no trip
    put(sheet, "tripTorqueRatio", controller.failSafe.torque, "ratio", LIMITS.ratio);
    return;
  }
  putSteps(sheet, "tripAfterSteps", trip.after, controller.guardStep);
  put(sheet, "tripTorqueRatio", trip.torque, "ratio", LIMITS.ratio);
  put(sheet, "tripReleaseBelowRpm", trip.releaseBelow, "rpm", LIMITS.speed);
  compare(sheet, "tripReleaseBelowRpm", "below", "speedCeilingRpm");
  putSteps(sheet, "tripReleaseAfterSteps", trip.releaseAfter, controller.guardStep);
  put(sheet, "tripAcceleratorBelowRatio", trip.acceleratorBelow, "ratio", LIMITS.ratio);
  putSteps(sheet, "tripOrAfterSteps", trip.orAfter, controller.guardStep);
}

/** Overspeed guard and fail-safe. */
export function putGuard(sheet: Sheet, controller: ControllerSpec): void {
  const base = controller.feedback.coordinate === "effective_area" ? "mm2" : "ratio";
  putLimits(sheet, controller.overspeedGuard);
  putProportional(sheet, controller.overspeedGuard, base);
  putTrip(sheet, controller, controller.overspeedGuard?.trip);
  put(sheet, "failSafeTorqueRatio", controller.failSafe.torque, "ratio", LIMITS.ratio);
}
