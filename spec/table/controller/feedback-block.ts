import {
  amount,
  block,
  curve,
  duration,
  optional,
  quantity,
  range,
  required,
  shape,
  standard,
  structural,
  variants,
  words,
} from "../build.ts";
import type { UnitChoice } from "../kind.ts";
import {
  AREA,
  NOT_NEGATIVE,
  OPENING,
  OPENING_COORDINATE,
  PER_GAUGE,
  PER_KPA,
  POSITIVE,
  PRESSURE_AXIS,
  ratio,
  SPEED_AXIS,
} from "./common.ts";

interface GainExamples {
  readonly areaPerGauge: string;
  readonly areaPerKpa: string;
  readonly openingPerGauge: string;
  readonly openingPerKpa: string;
}
/** A unit by its example: `0.4 %/kPa` is stored in 1/kPa. */
const like = (example: string, coordinate: readonly string[], schedule: readonly string[]): UnitChoice => {
  const shown = example.slice(example.indexOf(" ") + 1);
  return amount(shown, shown.replace("%", "1"), { coordinate, schedule }, example);
};
/** Units of a feedback constant: per kPa of error, or per unit of relative error under `per_gauge_pressure`. */
const gainUnits = (examples: GainExamples): UnitChoice[] => [
  like(examples.areaPerGauge, AREA, PER_GAUGE),
  like(examples.areaPerKpa, AREA, PER_KPA),
  like(examples.openingPerGauge, OPENING_COORDINATE, PER_GAUGE),
  like(examples.openingPerKpa, OPENING_COORDINATE, PER_KPA),
];
const PROPORTIONAL = gainUnits({
  areaPerGauge: "1481 mm2",
  areaPerKpa: "10 mm2/kPa",
  openingPerGauge: "60 %",
  openingPerKpa: "0.4 %/kPa",
});
const INTEGRAL = gainUnits({
  areaPerGauge: "3951 mm2/s",
  areaPerKpa: "28 mm2/kPa/s",
  openingPerGauge: "150 %/s",
  openingPerKpa: "1 %/kPa/s",
});
const DERIVATIVE = gainUnits({
  areaPerGauge: "163 mm2*s",
  areaPerKpa: "1.2 mm2*s/kPa",
  openingPerGauge: "6 %*s",
  openingPerKpa: "0.05 %*s/kPa",
});
const coordinateUnits = [
  amount("mm2", "mm2", { coordinate: AREA }, "-220 mm2 to 220 mm2"),
  amount("%", "", { coordinate: OPENING_COORDINATE }, "-20 % to 20 %"),
];

const gain = (units: readonly UnitChoice[]) =>
  shape({
    scalar: quantity(units, NOT_NEGATIVE),
    map: curve({ ...SPEED_AXIS, ...PRESSURE_AXIS }, units, NOT_NEGATIVE),
  });

const bandUnits = [
  amount("%", "", { schedule: PER_GAUGE }, "10 %"),
  amount("kPa", "kPa", { schedule: PER_KPA }, "10 kPa"),
];
const stillUnits = [
  amount("%/s", "1/s", { schedule: PER_GAUGE }, "15 %/s"),
  amount("kPa/s", "kPa/s", { schedule: PER_KPA }, "15 kPa/s"),
];

const ANTI_WINDUP = variants("method", "how the integral is kept from winding up", {
  conditional: {
    band: required(quantity(bandUnits, POSITIVE), "integrate only with the error inside this band", "10 %"),
    still_below: required(
      quantity(stillUnits, NOT_NEGATIVE),
      "or with the pressure moving slower than this",
      "15 %/s",
    ),
  },
  back_calculation: {
    tracking_time: required(
      duration(POSITIVE),
      "the integral follows the applied value with this time constant",
      "200 ms",
    ),
  },
  none: {},
});

export const FEEDBACK_BLOCK = block({
  coordinate: structural(
    required(words("effective_area", "opening"), "what feedforward and feedback add up in", "effective_area"),
  ),
  schedule: structural(
    required(
      words("per_gauge_pressure", "constant", "over_engine_speed", "over_target_pressure"),
      "what the gains are scheduled by",
      "per_gauge_pressure",
    ),
  ),
  proportional: required(gain(PROPORTIONAL), "proportional constant, positive", "1481 mm2"),
  integral: optional(gain(INTEGRAL), "integral constant, positive", "3951 mm2/s"),
  derivative: optional(gain(DERIVATIVE), "derivative constant, positive, on the measurement", "163 mm2*s"),
  derivative_filter: optional(duration(POSITIVE), "time constant of the derivative's filter", "20 ms"),
  setpoint_weight: standard(
    quantity(ratio, OPENING),
    "100 %",
    "share of the target in the proportional part",
  ),
  trim_limits: required(range(coordinateUnits), "limits of the integral", "-220 mm2 to 220 mm2"),
  anti_windup: optional(
    ANTI_WINDUP,
    "needed with an integral",
    "{ method: conditional, band: 10 %, still_below: 15 %/s }",
  ),
});
