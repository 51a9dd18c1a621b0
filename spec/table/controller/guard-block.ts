import { amount, bareUnit, block, duration, optional, quantity, required, standard } from "../build.ts";
import { AREA, NOT_NEGATIVE, OPENING, OPENING_COORDINATE, POSITIVE, ratio, speed } from "./common.ts";

const guardGainUnits = [
  amount("mm2/krpm", "mm2/rpm", { coordinate: AREA }, "20.9 mm2/krpm"),
  amount("%/krpm", "1/rpm", { coordinate: OPENING_COORDINATE }, "3 %/krpm"),
];

export const GUARD_BLOCK = block(
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
