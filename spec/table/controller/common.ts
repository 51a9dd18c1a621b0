// Limits, units and axes that several sections of the controller share.
import { absolutePressure, amount, bareUnit, ratioUnit } from "../build.ts";
import type { Limits } from "../kind.ts";

export const POSITIVE: Limits = { above: "0" };
export const NOT_NEGATIVE: Limits = { atLeast: "0" };
/** With the longest time below, counts of steps stay exact in a float32. */
export const STEP: Limits = { atLeast: "0.1 ms", atMost: "1 s" };
export const OPENING: Limits = { atLeast: "0", atMost: "100 %" };

export const speed = amount("rpm");
export const pressure = amount("kPa");
export const absolute = absolutePressure("kPa");
export const ratio = ratioUnit();

export const AREA = ["effective_area"];
export const OPENING_COORDINATE = ["opening"];
export const PER_GAUGE = ["per_gauge_pressure"];
export const PER_KPA = ["constant", "over_engine_speed", "over_target_pressure"];

/** Axes of curves and tables, with points to paste. */
export const SPEED_AXIS = { engine_speed: { ...speed, example: "[2000, 4000, 6000]" } };
export const PRESSURE_AXIS = { target_pressure: { ...absolute, example: "[120, 180, 240]" } };
export const RATIO_AXIS = { pressure_ratio: { ...bareUnit, example: "[1.2, 1.8, 2.4]" } };
