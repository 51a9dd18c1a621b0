import {
  amount,
  block,
  duration,
  optional,
  quantity,
  range,
  required,
  standard,
  temperatureLevel,
} from "../build.ts";
import type { UnitChoice } from "../kind.ts";
import { absolute, POSITIVE, pressure, ratio, speed } from "./common.ts";

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
