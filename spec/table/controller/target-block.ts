import {
  amount,
  bareUnit,
  block,
  optional,
  quantity,
  required,
  standard,
  table,
  temperatureLevel,
} from "../build.ts";
import { absolute, NOT_NEGATIVE, POSITIVE, pressure, ratio, SPEED_AXIS } from "./common.ts";

export const TARGET_BLOCK = block({
  boost: required(
    table({ accelerator: ratio }, SPEED_AXIS, [{ ...absolute, gauge: "kept" }, bareUnit], NOT_NEGATIVE),
    "wanted pressure upstream of the throttle at reference air: absolute, gauge, or a plain ratio to ambient",
    '{ rows: { accelerator: [0, 100], unit: "%" }, columns: { engine_speed: [2000, 6000], unit: rpm }, unit: kPa abs, values: [[100, 100], [200, 220]] }',
  ),
  air_compensation: optional(
    block({
      reference_temperature: required(
        quantity(temperatureLevel, POSITIVE),
        "charge temperature the table was made at",
        "25 degC",
      ),
      reference_pressure: standard(
        quantity(absolute, POSITIVE),
        "101.325 kPa abs",
        "ambient pressure the table was made at; counts for gauge and ratio targets",
      ),
      strength: required(
        quantity(ratio, { atLeast: "0", atMost: "100 %" }),
        "share of the density change that is made good",
        "80 %",
      ),
      at_most: required(
        quantity(ratio, { atLeast: "0", atMost: "100 %" }),
        "largest rise of the target",
        "20 %",
      ),
    }),
    "raises the target when the charge is hot",
    "{ reference_temperature: 25 degC, strength: 80 %, at_most: 20 % }",
  ),
  ceiling: required(quantity(absolute, POSITIVE), "the target never exceeds it", "245 kPa abs"),
  pressure_ratio_ceiling: optional(
    quantity(bareUnit, { above: "1" }),
    "limit of the target over ambient pressure",
    "2.7",
  ),
  least_boost: standard(
    quantity(pressure, NOT_NEGATIVE),
    "5 kPa",
    "a target less than this above ambient means no boost",
  ),
  slew: required(
    block({
      rise: required(quantity(amount("kPa/s"), POSITIVE), "fastest rise of the target", "900 kPa/s"),
      fall: required(quantity(amount("kPa/s"), POSITIVE), "fastest fall of the target", "1500 kPa/s"),
    }),
    "how fast the target may move",
    "{ rise: 900 kPa/s, fall: 1500 kPa/s }",
  ),
});
