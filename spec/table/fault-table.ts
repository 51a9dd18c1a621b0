import { absolutePressure, amount, bareUnit, free, optional, required, standard } from "./build.ts";
import type { KeySet, Limits } from "./kind.ts";

const POSITIVE: Limits = { above: "0" };
const seconds = amount("ms", "s");
const area = free(amount("mm2", "m2"), { atLeast: "0" });
const factor = free(bareUnit, POSITIVE);

const when = {
  at: standard(free(seconds, { atLeast: "0" }), "0 s", "when it starts", "1 s"),
  for: optional(free(seconds, POSITIVE), "how long it lasts; absent: until the end", "500 ms"),
};
const fault = <const Fields extends KeySet>(fields: Fields) => ({ ...when, ...fields });

/** Every kind of fault with its own fields: one line adds one. Stored in kPa, rpm, m2, s or plain. */
export const FAULTS = {
  boost_pressure_stuck: fault({
    value: optional(free(absolutePressure("kPa")), "absent: at its present value", "100 kPa abs"),
  }),
  turbo_speed_stuck: fault({
    value: optional(free(amount("rpm"), { atLeast: "0" }), "absent: at its present value", "90000 rpm"),
  }),
  boost_pressure_lost: fault({}),
  turbo_speed_lost: fault({}),
  boost_leak: fault({ area: required(area, "effective area to ambient", "100 mm2") }),
  exhaust_leak: fault({ area: required(area, "effective area to ambient", "50 mm2") }),
  clogged_filter: fault({ factor: required(factor, "multiplies the air filter's loss", "4") }),
  turbine_efficiency: fault({ factor: required(factor, "multiplies the turbine's efficiency", "0.9") }),
  guard_task_delayed: fault({
    by: required(free(seconds, { atLeast: "0" }), "each run of the guard task is late by this", "50 ms"),
  }),
  guard_task_every: fault({
    period: required(free(seconds, POSITIVE), "the guard task runs only this often", "20 ms"),
  }),
  wastegate_stuck: fault({}),
  wastegate_slow: fault({ factor: required(factor, "divides the actuator's speed", "3") }),
} as const;
export type FaultKindName = keyof typeof FAULTS;
