import {
  absolutePressure,
  amount,
  bareUnit,
  block,
  free,
  list,
  map,
  optional,
  quantity,
  ratioUnit,
  required,
  shape,
  standard,
  temperatureLevel,
  variants,
  words,
} from "./build.ts";
import { FAULTS } from "./fault-table.ts";
import type { Limits, UnitChoice } from "./kind.ts";

const seconds = amount("s");
const NOT_NEGATIVE: Limits = { atLeast: "0" };
const POSITIVE: Limits = { above: "0" };
const speed = amount("rpm");
const absolute = absolutePressure("kPa");

const course = (unit: UnitChoice, limits: Limits, example: string) =>
  list(
    block({
      at: required(free(seconds, NOT_NEGATIVE), "when the value starts to move", "1 s"),
      value: required(free(unit, limits), "where it moves to", example),
      over: standard(free(seconds, NOT_NEGATIVE), "0 s", "how long it takes, linearly; 0: a step", "300 ms"),
    }),
  );

const RATIO: Limits = { atLeast: "0", atMost: "100 %" };
const SPEED: Limits = { atLeast: "0 rpm", atMost: "20000 rpm" };

export const SCENARIO_BLOCK = block({
  duration: required(free(seconds, { above: "0", atMost: "600 s" }), "length of the run", "6 s"),
  engine_speed: required(
    shape({
      scalar: free(speed, SPEED),
      list: course(speed, SPEED, "5000 rpm"),
      map: block({
        vehicle_from: required(free(speed, SPEED), "free vehicle, starting at this speed", "3000 rpm"),
      }),
    }),
    "held, a course, or free from a start speed",
    "between 2500 rpm and 6000 rpm",
  ),
  accelerator: required(
    shape({ scalar: free(ratioUnit(), RATIO), list: course(ratioUnit(), RATIO, "100 %") }),
    "held, or a course",
    "[{ at: 0 s, value: 20 % }, { at: 1 s, value: 100 % }]",
  ),
  target: optional(
    shape({ scalar: free(absolute, POSITIVE), list: course(absolute, POSITIVE, "200 kPa abs") }),
    "wanted boost in place of table and compensation",
    "[{ at: 0 s, value: 160 kPa abs }, { at: 1 s, value: 200 kPa abs }]",
  ),
  ceilings: standard(
    words("on", "off"),
    "on",
    "off: the target's ceilings are out of the way (only with `target`)",
  ),
  ambient: standard(
    block({
      temperature: standard(
        free(temperatureLevel, { atLeast: "-60 degC", atMost: "80 degC" }),
        "25 degC",
        "of the air",
      ),
      altitude: standard(
        free(amount("m"), { atLeast: "-500 m", atMost: "11000 m" }),
        "0 m",
        "sets the ambient pressure",
      ),
    }),
    "{}",
    "weather; absent: 25 degC at sea level",
    "{ temperature: between -10 degC and 42 degC, altitude: between 0 m and 2500 m }",
  ),
  plant_scatter: standard(
    shape({
      words: words("none", "default"),
      scalar: quantity(ratioUnit(), { atLeast: "0", atMost: "50 %" }),
    }),
    "none",
    "which plant parameters vary from run to run: none, the named set, or all by a percentage",
    "default",
  ),
  sensor_noise: standard(
    shape({ words: words("nominal", "none"), scalar: quantity(bareUnit, { atLeast: "0", atMost: "100" }) }),
    "nominal",
    "nominal, none, or a factor on every sensor's noise",
  ),
  faults: standard(
    shape({ words: words("none"), list: list(variants("kind", "what fails", FAULTS)) }),
    "none",
    "what fails, and when",
    "[{ kind: boost_leak, area: 100 mm2, at: 2 s }]",
  ),
});

export const SCENARIOS = map(SCENARIO_BLOCK);
