// Longer than most files: a generator that covers every structural choice of the spec reads best in one piece.
import fc from "fast-check";

// Valid specs that cover every structural choice: reference, coordinate, schedule, gains as numbers and curves,
// anti-windup, guard kinds, optional signals, filters and fault checks, table sizes, step times, precision.

const oneOf = <const T extends string | number>(...values: readonly T[]) => fc.constantFrom(...values);
const maybe = <T>(arbitrary: fc.Arbitrary<T>) => fc.option(arbitrary, { nil: undefined });

/** `count` rising numbers from `from`, in steps of at least one `unit`. */
const rising = (from: number, unit: number, least: number, most: number) =>
  fc.array(fc.integer({ min: 1, max: 9 }), { minLength: least, maxLength: most }).map((steps) => {
    let at = from;
    return steps.map((step) => {
      at += step * unit;
      return Number(at.toFixed(6));
    });
  });

const list = (values: readonly number[]): string => `[${values.join(", ")}]`;
const grid = (values: readonly (readonly number[])[]): string => `[${values.map(list).join(", ")}]`;

const fault = fc.record({
  after: fc.integer({ min: 0, max: 60 }),
  heals: fc.integer({ min: 0, max: 400 }),
  rate: fc.boolean(),
  rateScale: fc.integer({ min: 1, max: 40 }),
  window: oneOf(20, 40, 60),
  stuck: maybe(fc.integer({ min: 20, max: 600 })),
});
type Fault = typeof fault extends fc.Arbitrary<infer T> ? T : never;

const signal = fc.record({ filter: maybe(fc.integer({ min: 1, max: 80 })), fault: maybe(fault) });
type Signal = typeof signal extends fc.Arbitrary<infer T> ? T : never;

interface Sensor {
  readonly range: string;
  readonly otherwise?: string;
  /** Unit of its rate, and a slow believable rate. */
  readonly rate: readonly [number, string];
  readonly canStick: boolean;
}

const SENSORS: Readonly<Record<string, Sensor>> = {
  engine_speed: {
    range: "0 rpm to 9000 rpm",
    otherwise: "3000 rpm",
    rate: [10000, "rpm/s"],
    canStick: false,
  },
  accelerator: { range: "0 % to 100 %", otherwise: "0 %", rate: [500, "%/s"], canStick: false },
  boost_pressure: { range: "20 kPa abs to 350 kPa abs", rate: [500, "kPa/s"], canStick: true },
  ambient_pressure: {
    range: "50 kPa abs to 110 kPa abs",
    otherwise: "100 kPa abs",
    rate: [50, "kPa/s"],
    canStick: false,
  },
  charge_temperature: {
    range: "-40 degC to 150 degC",
    otherwise: "25 degC",
    rate: [20, "K/s"],
    canStick: false,
  },
  boost_ceiling_request: {
    range: "50 kPa abs to 350 kPa abs",
    otherwise: "300 kPa abs",
    rate: [500, "kPa/s"],
    canStick: false,
  },
  turbo_speed: { range: "0 rpm to 230000 rpm", rate: [100000, "rpm/s"], canStick: true },
};

const faultText = ({ after, heals, rate, rateScale, window, stuck }: Fault, sensor: Sensor): string => {
  const [scale, unit] = sensor.rate;
  const parts = [
    `after: ${after} ms, heals_after: ${heals} ms`,
    ...(rate ? [`rate_above: ${scale * rateScale} ${unit}, rate_window: ${window} ms`] : []),
    ...(stuck !== undefined && sensor.canStick ? [`stuck_for: ${stuck} ms, stuck_moved: 5 kPa`] : []),
  ];
  return `fault: { ${parts.join(", ")} }`;
};

const signalText = (name: string, chosen: Signal): string => {
  const sensor = SENSORS[name];
  const parts = [
    `range: ${sensor.range}`,
    ...(sensor.otherwise === undefined ? [] : [`otherwise: ${sensor.otherwise}`]),
    ...(chosen.filter === undefined ? [] : [`filter: ${chosen.filter} ms`]),
    ...(chosen.fault === undefined ? [] : [faultText(chosen.fault, sensor)]),
  ];
  return `    ${name}: { ${parts.join(", ")} }`;
};

const gainShape = fc.record({
  curve: fc.boolean(),
  axis: rising(500, 200, 2, 7),
  values: fc.array(fc.integer({ min: 1, max: 60 }), { minLength: 7, maxLength: 7 }),
});
type GainShape = typeof gainShape extends fc.Arbitrary<infer T> ? T : never;

const choices = fc.record({
  precision: oneOf("float32", "float64"),
  stepMs: oneOf(2, 5, 10, 20),
  division: oneOf(1, 2, 4, 5),
  signals: fc.record({
    engine_speed: signal,
    accelerator: signal,
    boost_pressure: signal,
    ambient_pressure: signal,
    charge_temperature: maybe(signal),
    boost_ceiling_request: maybe(signal),
    turbo_speed: maybe(signal),
  }),
  reference: oneOf("kPa abs", "kPa gauge", "ratio"),
  targetRows: rising(-10, 10, 2, 5),
  targetColumns: rising(1000, 400, 2, 5),
  targetBase: fc.integer({ min: 0, max: 20 }),
  airCompensation: fc.boolean(),
  ratioCeiling: fc.boolean(),
  leastBoost: fc.integer({ min: 0, max: 20 }),
  rise: fc.integer({ min: 50, max: 2000 }),
  fall: fc.integer({ min: 50, max: 2000 }),
  area: fc.boolean(),
  areaSteps: fc.array(fc.integer({ min: 1, max: 120 }), { minLength: 2, maxLength: 8 }),
  feedforward: oneOf("none", "pressure_ratio", "target_pressure"),
  feedforwardColumns: rising(1500, 500, 2, 5),
  feedforwardRows: fc.integer({ min: 2, max: 5 }),
  schedule: oneOf("per_gauge_pressure", "over_engine_speed", "over_target_pressure", "constant"),
  proportional: gainShape,
  integral: maybe(gainShape),
  derivative: maybe(gainShape),
  weight: oneOf(100, 90),
  antiWindup: oneOf("conditional", "back_calculation", "none"),
  openingHigh: oneOf(100, 90),
  guard: oneOf("none", "trip", "proportional", "both"),
  guardWindowSteps: fc.integer({ min: 1, max: 12 }),
  tripAfterMs: fc.integer({ min: 0, max: 30 }),
  releaseAfterMs: fc.integer({ min: 0, max: 400 }),
});
type Choices = typeof choices extends fc.Arbitrary<infer T> ? T : never;

const signalsText = ({ signals, guard, airCompensation }: Choices): readonly string[] => {
  const plain: Signal = { filter: undefined, fault: undefined };
  const needed = {
    ...signals,
    turbo_speed: guard === "none" ? undefined : (signals.turbo_speed ?? plain),
    charge_temperature: airCompensation ? (signals.charge_temperature ?? plain) : undefined,
  };
  return Object.entries(needed).flatMap(([name, chosen]) =>
    chosen === undefined ? [] : [signalText(name, chosen)],
  );
};

const targetText = (chosen: Choices): readonly string[] => {
  const { reference, targetRows, targetColumns, targetBase } = chosen;
  const value = (row: number, column: number): number => {
    const boost = targetBase + row * 30 + column * 7;
    return reference === "kPa abs"
      ? 100 + boost
      : reference === "kPa gauge"
        ? boost
        : Number((1 + boost / 100).toFixed(2));
  };
  const values = targetRows.map((_, row) => targetColumns.map((__, column) => value(row, column)));
  return [
    "  target:",
    "    boost:",
    `      rows: { accelerator: ${list(targetRows)}, unit: "%" }`,
    `      columns: { engine_speed: ${list(targetColumns)}, unit: rpm }`,
    ...(reference === "ratio" ? [] : [`      unit: ${reference}`]),
    `      values: ${grid(values)}`,
    ...(chosen.airCompensation
      ? ["    air_compensation: { reference_temperature: 40 degC, strength: 80 %, at_most: 20 % }"]
      : []),
    "    ceiling: 245 kPa abs",
    ...(chosen.ratioCeiling ? ["    pressure_ratio_ceiling: 2.7"] : []),
    `    least_boost: ${chosen.leastBoost} kPa`,
    `    slew: { rise: ${chosen.rise} kPa/s, fall: ${chosen.fall} kPa/s }`,
  ];
};

/** mm2 of the valve at each point of its opening. */
const areas = ({ areaSteps }: Choices): readonly number[] => {
  let area = 4;
  return areaSteps.map((step) => {
    area += step;
    return area;
  });
};

const wastegateText = (chosen: Choices): readonly string[] => {
  if (!chosen.area) {
    return [];
  }
  const values = areas(chosen);
  const openings = values.map((_, i) => Number(((100 * i) / (values.length - 1)).toFixed(3)));
  return [
    "  wastegate:",
    `    effective_area: { over: { opening: ${list(openings)}, unit: "%" }, unit: mm2, values: ${list(values)} }`,
  ];
};

const feedforwardText = (chosen: Choices): readonly string[] => {
  const { feedforward, feedforwardColumns, feedforwardRows, area } = chosen;
  if (feedforward === "none") {
    return [];
  }
  const rows = Array.from({ length: feedforwardRows }, (_, i) =>
    feedforward === "pressure_ratio" ? Number((1 + i * 0.4).toFixed(1)) : 100 + 35 * i,
  );
  const full = area ? 400 : 95;
  const values = rows.map((_, row) =>
    feedforwardColumns.map((__, column) =>
      Number((full * (0.5 + 0.05 * column) * (1 - row / rows.length)).toFixed(1)),
    ),
  );
  return [
    "  feedforward:",
    `    rows: { ${feedforward}: ${list(rows)}${feedforward === "pressure_ratio" ? "" : ", unit: kPa abs"} }`,
    `    columns: { engine_speed: ${list(feedforwardColumns)}, unit: rpm }`,
    `    unit: ${area ? "mm2" : '"%"'}`,
    `    values: ${grid(values)}`,
  ];
};

/** Gains small enough for a set-point weight of 90 % to fit the trim limits. */
const gainText = ({ schedule, area }: Choices, shape: GainShape, suffix: "" | "/s" | "*s"): string => {
  const relative = schedule === "per_gauge_pressure";
  const quantity = area ? "mm2" : "%";
  const unit = relative
    ? `${quantity}${suffix}`
    : suffix === "*s"
      ? `${quantity}*s/kPa`
      : `${quantity}/kPa${suffix}`;
  const scale = (area ? 5 : 0.5) * (relative ? 2 : 0.02);
  const text = (value: number) => Number((value * scale).toFixed(4));
  const isCurve = shape.curve && (schedule === "over_engine_speed" || schedule === "over_target_pressure");
  if (!isCurve) {
    return `${text(shape.values[0])} ${unit}`;
  }
  const isSpeed = schedule === "over_engine_speed";
  const axis = isSpeed ? shape.axis : shape.axis.map((each) => Number((100 + each / 50).toFixed(3)));
  const over = isSpeed
    ? `engine_speed: ${list(axis)}, unit: rpm`
    : `target_pressure: ${list(axis)}, unit: kPa abs`;
  return `{ over: { ${over} }, unit: "${unit}", values: ${list(axis.map((_, i) => text(shape.values[i])))} }`;
};

const antiWindupText = ({ antiWindup, schedule }: Choices): string => {
  const relative = schedule === "per_gauge_pressure";
  switch (antiWindup) {
    case "conditional":
      return `{ method: conditional, band: ${relative ? "10 %" : "10 kPa"}, still_below: ${relative ? "15 %/s" : "15 kPa/s"} }`;
    case "back_calculation":
      return "{ method: back_calculation, tracking_time: 250 ms }";
    case "none":
      return "{ method: none }";
  }
};

const feedbackText = (chosen: Choices): readonly string[] => {
  const { integral, derivative, area } = chosen;
  return [
    "  feedback:",
    `    coordinate: ${area ? "effective_area" : "opening"}`,
    `    schedule: ${chosen.schedule}`,
    `    proportional: ${gainText(chosen, chosen.proportional, "")}`,
    ...(integral === undefined
      ? []
      : [`    integral: ${gainText(chosen, integral, "/s")}`, `    anti_windup: ${antiWindupText(chosen)}`]),
    ...(derivative === undefined
      ? []
      : [`    derivative: ${gainText(chosen, derivative, "*s")}`, "    derivative_filter: 45 ms"]),
    `    setpoint_weight: ${chosen.weight} %`,
    `    trim_limits: ${area ? "-400 mm2 to 400 mm2" : "-90 % to 90 %"}`,
  ];
};

const guardText = (chosen: Choices): readonly string[] => {
  const { guard, stepMs, division, guardWindowSteps, area } = chosen;
  if (guard === "none") {
    return [];
  }
  const proportional = [
    "    lead: 120 ms",
    `    acceleration_window: ${(guardWindowSteps * stepMs) / division} ms`,
    "    reference_speed: 90000 rpm",
    `    gain: ${area ? "5 mm2/krpm" : "3 %/krpm"}`,
    "    integral_rate: 1 1/s",
    "    safe_pressure_ratio: 1.6",
    "    target_reduction: 4 kPa/krpm",
    "    target_release: 40 kPa/s",
  ];
  const trip = [
    `    trip: { after: ${chosen.tripAfterMs} ms, torque: 40 %, release_below: 80000 rpm, release_after: ${chosen.releaseAfterMs} ms, accelerator_below: 10 %, or_after: 1 s }`,
  ];
  return [
    "  overspeed_guard:",
    "    limit: 120000 rpm",
    "    margin: 10 %",
    ...(guard === "trip" ? [] : proportional),
    ...(guard === "proportional" ? [] : trip),
  ];
};

const specText = (chosen: Choices): string =>
  [
    "spoolwright: 1",
    "controller:",
    "  name: random_loop",
    "  description: A random loop for the agreement test (invented)",
    `  step: ${chosen.stepMs} ms`,
    `  guard_step: ${chosen.stepMs / chosen.division} ms`,
    `  precision: ${chosen.precision}`,
    "  signals:",
    ...signalsText(chosen),
    ...targetText(chosen),
    ...wastegateText(chosen),
    ...feedforwardText(chosen),
    ...feedbackText(chosen),
    `  actuator: { opening: 0 % to ${chosen.openingHigh} %, slew: { open: 900 %/s, close: 500 %/s }, safe_opening: 80 %, rest_opening: 30 % }`,
    ...guardText(chosen),
    "  fail_safe: { torque: 40 % }",
    "",
  ].join("\n");

/** Text of a valid spec with random structure and values. */
export const randomSpec: fc.Arbitrary<string> = choices.map(specText);
