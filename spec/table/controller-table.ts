import {
  amount,
  block,
  curve,
  duration,
  identifier,
  optional,
  quantity,
  required,
  sentence,
  standard,
  structural,
  table,
  words,
} from "./build.ts";
import { ACTUATOR_BLOCK } from "./controller/actuator-block.ts";
import {
  AREA,
  NOT_NEGATIVE,
  OPENING,
  OPENING_COORDINATE,
  PRESSURE_AXIS,
  RATIO_AXIS,
  ratio,
  SPEED_AXIS,
  STEP,
} from "./controller/common.ts";
import { FEEDBACK_BLOCK } from "./controller/feedback-block.ts";
import { GUARD_BLOCK } from "./controller/guard-block.ts";
import { SIGNALS_BLOCK } from "./controller/signals-block.ts";
import { TARGET_BLOCK } from "./controller/target-block.ts";

const feedforwardUnits = [
  amount("mm2", "mm2", { coordinate: AREA }),
  amount("%", "", { coordinate: OPENING_COORDINATE }),
];

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
