import {
  absolutePressure,
  amount,
  bareUnit,
  block,
  curve,
  duration,
  identifier,
  optional,
  quantity,
  range,
  ratioUnit,
  required,
  sentence,
  shape,
  standard,
  structural,
  table,
  temperatureLevel,
  variants,
  words,
} from "./build.ts";
import type { Limits, UnitChoice } from "./kind.ts";

const POSITIVE: Limits = { above: "0" };
const NOT_NEGATIVE: Limits = { atLeast: "0" };
/** With the longest time below, counts of steps stay exact in a float32. */
const STEP: Limits = { atLeast: "0.1 ms", atMost: "1 s" };
const OPENING: Limits = { atLeast: "0", atMost: "100 %" };

const speed = amount("rpm");
const pressure = amount("kPa");
const absolute = absolutePressure("kPa");
const ratio = ratioUnit();

const AREA = ["effective_area"];
const OPENING_COORDINATE = ["opening"];
const PER_GAUGE = ["per_gauge_pressure"];
const PER_KPA = ["constant", "over_engine_speed", "over_target_pressure"];

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
const feedforwardUnits = [
  amount("mm2", "mm2", { coordinate: AREA }),
  amount("%", "", { coordinate: OPENING_COORDINATE }),
];
const guardGainUnits = [
  amount("mm2/krpm", "mm2/rpm", { coordinate: AREA }, "20.9 mm2/krpm"),
  amount("%/krpm", "1/rpm", { coordinate: OPENING_COORDINATE }, "3 %/krpm"),
];

/** Axes of curves and tables, with points to paste. */
const SPEED_AXIS = { engine_speed: { ...speed, example: "[2000, 4000, 6000]" } };
const PRESSURE_AXIS = { target_pressure: { ...absolute, example: "[120, 180, 240]" } };
const RATIO_AXIS = { pressure_ratio: { ...bareUnit, example: "[1.2, 1.8, 2.4]" } };

const gain = (units: readonly UnitChoice[]) =>
  shape({
    scalar: quantity(units, NOT_NEGATIVE),
    map: curve({ ...SPEED_AXIS, ...PRESSURE_AXIS }, units, NOT_NEGATIVE),
  });

const fault = (rate: UnitChoice, rateExample: string, window: string) =>
  block({
    after: standard(duration(), "50 ms", "suspect for this long: failed"),
    heals_after: standard(duration(), "500 ms", "good for this long: healthy again"),
    rate_above: optional(quantity(rate, POSITIVE), "a faster change is suspect", rateExample),
    rate_window: standard(duration(POSITIVE), window, "the change is taken over this time"),
    stuck_for: optional(duration(POSITIVE), "the same for this long while boost moves is suspect", "400 ms"),
    stuck_moved: standard(
      quantity(pressure, POSITIVE),
      "5 kPa",
      "how far another signal must have moved meanwhile",
    ),
  });

interface SignalUnits {
  readonly level: UnitChoice;
  readonly rate: UnitChoice;
  readonly range: string;
  readonly otherwise: string;
  readonly rateExample: string;
  readonly window?: string;
}

const signal = ({ level, rate, range: span, otherwise, rateExample, window = "20 ms" }: SignalUnits) =>
  block({
    range: required(range(level), "believable values", span),
    otherwise: optional(quantity(level), "used while the signal has failed", otherwise),
    filter: optional(duration(), "time constant of a first-order filter", "8 ms"),
    fault: standard(
      fault(rate, rateExample, window),
      "{}",
      "when the signal is suspect, failed and healthy again",
      "{ after: 50 ms }",
    ),
  });

const speedSignal = (span: string, otherwise: string, rateExample: string, window?: string) =>
  signal({
    level: speed,
    rate: amount("rpm/s"),
    range: span,
    otherwise,
    rateExample,
    ...(window ? { window } : {}),
  });
const pressureSignal = (span: string, otherwise: string) =>
  signal({ level: absolute, rate: amount("kPa/s"), range: span, otherwise, rateExample: "4000 kPa/s" });
const temperatureSignal = (span: string) =>
  signal({
    level: temperatureLevel,
    rate: amount("K/s"),
    range: span,
    otherwise: "25 degC",
    rateExample: "50 K/s",
  });

export const SIGNALS_BLOCK = block({
  engine_speed: required(
    speedSignal("0 rpm to 9000 rpm", "3000 rpm", "30000 rpm/s"),
    "engine speed",
    "{ range: 0 rpm to 9000 rpm }",
  ),
  accelerator: required(
    signal({
      level: ratio,
      rate: amount("%/s", "1/s"),
      range: "0 % to 100 %",
      otherwise: "0 %",
      rateExample: "5000 %/s",
    }),
    "the driver's request",
    "{ range: 0 % to 100 % }",
  ),
  boost_pressure: required(
    pressureSignal("20 kPa abs to 350 kPa abs", "100 kPa abs"),
    "upstream of the throttle",
    "{ range: 20 kPa abs to 350 kPa abs }",
  ),
  ambient_pressure: required(
    pressureSignal("50 kPa abs to 110 kPa abs", "100 kPa abs"),
    "of the weather",
    "{ range: 50 kPa abs to 110 kPa abs }",
  ),
  charge_temperature: optional(
    temperatureSignal("-40 degC to 150 degC"),
    "after the intercooler; needed by air compensation",
    "{ range: -40 degC to 150 degC, otherwise: 25 degC }",
  ),
  inlet_temperature: optional(
    temperatureSignal("-40 degC to 80 degC"),
    "at the compressor inlet",
    "{ range: -40 degC to 80 degC, otherwise: 25 degC }",
  ),
  manifold_pressure: optional(
    pressureSignal("10 kPa abs to 350 kPa abs", "100 kPa abs"),
    "downstream of the throttle",
    "{ range: 10 kPa abs to 350 kPa abs }",
  ),
  turbo_speed: optional(
    speedSignal("0 rpm to 230000 rpm", "0 rpm", "600000 rpm/s", "10 ms"),
    "of the rotor; needed by the overspeed guard",
    "{ range: 0 rpm to 230000 rpm }",
  ),
  boost_ceiling_request: optional(
    pressureSignal("50 kPa abs to 350 kPa abs", "350 kPa abs"),
    "limit asked for by other functions of the ECU",
    "{ range: 50 kPa abs to 350 kPa abs }",
  ),
});

const TARGET_BLOCK = block({
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

const FEEDBACK_BLOCK = block({
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

const ACTUATOR_BLOCK = block(
  {
    opening: standard(range(ratio, OPENING), "0 % to 100 %", "what the actuator may be asked for"),
    slew: required(
      block({
        open: required(quantity(amount("%/s", "1/s"), POSITIVE), "fastest opening", "900 %/s"),
        close: required(quantity(amount("%/s", "1/s"), POSITIVE), "fastest closing", "500 %/s"),
      }),
      "how fast the command may move",
      "{ open: 900 %/s, close: 500 %/s }",
    ),
    safe_opening: standard(quantity(ratio, OPENING), "100 %", "at start and in fail-safe"),
    rest_opening: standard(quantity(ratio, OPENING), "30 %", "while no boost is wanted"),
    on_power_loss: standard(words("open", "closed", "hold"), "open", "where the valve goes without power"),
  },
  { reserved: ["position_loop"] },
);

const GUARD_BLOCK = block(
  {
    limit: required(quantity(speed, POSITIVE), "the turbo's mechanical limit", "165000 rpm"),
    margin: required(
      quantity(ratio, { atLeast: "0", below: "50 %" }),
      "the trip acts this far below the limit",
      "3 %",
    ),
    lead: standard(duration(), "0 s", "how far ahead speed is predicted", "120 ms"),
    acceleration_window: standard(duration(POSITIVE), "50 ms", "speed change is taken over this time"),
    reference_speed: optional(
      quantity(speed, POSITIVE),
      "the proportional guard acts above it; needed with `gain`",
      "158000 rpm",
    ),
    gain: optional(
      quantity(guardGainUnits, POSITIVE),
      "opening per speed; its presence adds the proportional guard",
      "20.9 mm2/krpm",
    ),
    integral_rate: standard(
      quantity(amount("1/s"), NOT_NEGATIVE),
      "1 1/s",
      "slow integral of the floor, per gain",
    ),
    safe_pressure_ratio: standard(
      quantity(bareUnit, { atLeast: "1" }),
      "2",
      "the floor starts from the feedforward at this ratio",
      "2.4",
    ),
    target_reduction: standard(
      quantity(amount("kPa/krpm", "kPa/rpm"), NOT_NEGATIVE),
      "0 kPa/krpm",
      "target taken back per speed above the reference",
      "4 kPa/krpm",
    ),
    target_release: standard(
      quantity(amount("kPa/s"), POSITIVE),
      "40 kPa/s",
      "how fast the target is given back",
    ),
    trip: optional(
      block({
        after: required(duration(), "speed above the ceiling for this long trips", "2 ms"),
        torque: required(quantity(ratio, OPENING), "torque limit while tripped", "40 %"),
        release_below: required(quantity(speed, POSITIVE), "speed that allows the release", "145000 rpm"),
        release_after: required(duration(), "below it for this long", "300 ms"),
        accelerator_below: required(quantity(ratio, OPENING), "and the accelerator below this", "10 %"),
        or_after: required(duration(), "or this long after the trip", "3 s"),
      }),
      "last resort: valve fully open and torque limited at once",
      "{ after: 2 ms, torque: 40 %, release_below: 145000 rpm, release_after: 300 ms, accelerator_below: 10 %, or_after: 3 s }",
    ),
  },
  { reserved: ["margin_without_sensor"] },
);

export const CONTROLLER_BLOCK = block(
  {
    name: structural(required(identifier, "prefix of all generated names", "skarn24_boost")),
    description: standard(sentence, "", "one sentence about the loop", "boost loop of an invented engine"),
    step: structural(required(duration(STEP), "period of the boost loop", "5 ms")),
    guard_step: structural(
      optional(duration(STEP), "period of the fast task; divides `step`; absent: the same", "1 ms"),
    ),
    precision: structural(
      standard(words("float32", "float64"), "float32", "arithmetic of the generated code"),
    ),
    signals: required(
      SIGNALS_BLOCK,
      "what the controller reads",
      "{ engine_speed: { range: 0 rpm to 9000 rpm } }",
    ),
    target: required(TARGET_BLOCK, "the wanted boost pressure", "{ ceiling: 245 kPa abs }"),
    wastegate: optional(
      block({
        effective_area: required(
          curve({ opening: ratio }, amount("mm2"), NOT_NEGATIVE, true),
          "effective area over opening, strictly increasing",
          '{ over: { opening: [0, 100], unit: "%" }, unit: mm2, values: [4, 630] }',
        ),
      }),
      "the valve; needed by `coordinate: effective_area`",
      '{ effective_area: { over: { opening: [0, 100], unit: "%" }, unit: mm2, values: [4, 630] } }',
    ),
    feedforward: optional(
      table({ ...RATIO_AXIS, ...PRESSURE_AXIS }, SPEED_AXIS, feedforwardUnits, NOT_NEGATIVE),
      "what holds the target in steady state, in the feedback coordinate",
      "{ rows: { pressure_ratio: [1, 2] }, columns: { engine_speed: [2000, 6000], unit: rpm }, unit: mm2, values: [[500, 600], [100, 200]] }",
    ),
    feedback: required(
      FEEDBACK_BLOCK,
      "the controller around the feedforward",
      "{ coordinate: effective_area }",
    ),
    actuator: required(
      ACTUATOR_BLOCK,
      "the wastegate's command",
      "{ slew: { open: 900 %/s, close: 500 %/s } }",
    ),
    overspeed_guard: optional(
      GUARD_BLOCK,
      "keeps the turbo below its limit; runs in the fast task",
      "{ limit: 165000 rpm, margin: 3 % }",
    ),
    fail_safe: optional(
      block({ torque: required(quantity(ratio, OPENING), "torque limit in fail-safe", "40 %") }),
      "absent: the trip's torque, else 40 %",
      "{ torque: 40 % }",
    ),
  },
  { reserved: ["lift_off_hold", "overboost_guard", "position_loop"] },
);
