import type { Explanation } from "../explanation.ts";

/** Rules of the trade; limits without a source are common practice. */
export const ENGINEERING_CODES = {
  "step-not-divisible": {
    severity: "error",
    cause: "The fast task must run a whole number of times in each slow step.",
    example: "step: 5 ms\nguard_step: 2 ms",
    fix: "Choose a guard step that divides the step, for example 1 ms.",
  },
  "derivative-filter-short": {
    severity: "warning",
    cause: "A derivative filter shorter than two steps lets the sensor's noise pass nearly unfiltered.",
    example: "step: 5 ms\nderivative_filter: 5 ms",
    fix: "Use at least two steps, usually four: `derivative_filter: 20 ms`.",
  },
  "tracking-time-short": {
    severity: "error",
    cause: "A back-calculation tracking time shorter than a step overcorrects in one step and oscillates.",
    example: "step: 5 ms\nanti_windup: { method: back_calculation, tracking_time: 1 ms }",
    fix: "Use a time between the derivative and the integral time, well above a step.",
  },
  "lead-shorter-than-step": {
    severity: "warning",
    cause:
      "The guard predicts speed less far ahead than its own period, so it learns of an overspeed one step late.",
    example: "guard_step: 5 ms\nlead: 2 ms",
    fix: "Make the lead a multiple of the guard's step, or run the guard more often.",
  },
  "needs-another-key": {
    severity: "error",
    cause: "A key makes sense only together with another one, which is missing.",
    example: "derivative: 163 mm2*s      # and no derivative_filter",
    fix: "Add the key that the message names.",
  },
  "no-effect": {
    severity: "warning",
    cause: "A key has no effect because another one that it belongs to is missing.",
    example: "derivative_filter: 20 ms   # and no derivative",
    fix: "Remove the key, or add the one it belongs to.",
  },
  "integral-without-anti-windup": {
    severity: "warning",
    cause: "The integral grows while the valve is at its end stop and then overshoots.",
    example: "integral: 3951 mm2/s\nanti_windup: { method: none }",
    fix: "Use `method: conditional` or `method: back_calculation`.",
  },
  "gain-axis": {
    severity: "error",
    cause: "A gain is a curve over a signal that the schedule does not use.",
    example:
      "schedule: over_engine_speed\nproportional: { over: { target_pressure: [100, 200], unit: kPa abs }, ... }",
    fix: "Give the curve over the schedule's signal, or a single number.",
  },
  "limits-exclude-zero": {
    severity: "error",
    cause: "The integral starts at 0 and returns to 0 without boost, so its limits must include 0.",
    example: "trim_limits: 20 mm2 to 220 mm2",
    fix: "Write limits on both sides of 0: `-220 mm2 to 220 mm2`.",
  },
  "setpoint-weight-beyond-trim": {
    severity: "warning",
    cause:
      "With a set-point weight b below 1 the proportional part on target is (1 - b) K; the integral must cancel it within its limits.",
    example: "proportional: 1481 mm2\nsetpoint_weight: 50 %\ntrim_limits: -220 mm2 to 220 mm2",
    fix: "Raise the weight or widen the trim limits.",
  },
  "feedforward-not-monotonic": {
    severity: "warning",
    cause:
      "Holding a higher boost needs a smaller opening, so the feedforward must not rise with the pressure ratio.",
    example: "values: [[300, 300], [400, 200]]",
    fix: "Check the order of the rows and the column that the message names.",
  },
  "target-above-ceiling": {
    severity: "warning",
    cause: "A whole column of the target table is above the ceiling, so none of its values is ever reached.",
    example: "ceiling: 245 kPa abs\nvalues: [[250, 200], [260, 240]]",
    fix: "Raise the ceiling or lower the column.",
  },
  "outside-actuator": {
    severity: "error",
    cause:
      "The safe or rest opening, or the integral's limits, are beyond what the actuator may be asked for.",
    example: "opening: 0 % to 90 %\nsafe_opening: 100 %",
    fix: "Use an opening inside the actuator's range, or widen the range if the part allows it.",
  },
  "closes-without-power": {
    severity: "warning",
    cause: "A wastegate that closes without power raises boost and turbo speed when nothing can act.",
    example: "on_power_loss: closed",
    fix: "Use a part that opens without power, or show by other means that a loss of power is safe.",
  },
  "missing-signal": {
    severity: "error",
    cause: "A section needs a signal that `signals` does not have.",
    example: "overspeed_guard: { ... }   # and no turbo_speed",
    fix: "Add the signal, or remove the section.",
  },
  "range-too-small": {
    severity: "error",
    cause:
      "A signal is believed only up to a value that the loop regularly passes, so good readings would count as faults.",
    example: "turbo_speed: { range: 0 rpm to 160000 rpm }\nlimit: 165000 rpm",
    fix: "Widen the signal's range to what the sensor can show.",
  },
  "rate-window-short": {
    severity: "warning",
    cause:
      "A rate is taken over so short a time that a single quantum of the sensor looks like a fast change.",
    example:
      "rate_above: 100000 rpm/s\nrate_window: 10 ms      # 6 pulses per revolution: a quantum of 1000 rpm",
    fix: "Lengthen the window until a quantum is less than a quarter of the rate.",
  },
  "guard-without-action": {
    severity: "error",
    cause: "The overspeed guard has neither a gain nor a trip, so it would never act.",
    example: "overspeed_guard: { limit: 165000 rpm, margin: 3 % }",
    fix: "Add `gain` and `reference_speed`, or `trip`, or both.",
  },
  "guard-floor-without-feedforward": {
    severity: "warning",
    cause:
      "The proportional guard opens the valve to at least the feedforward at its safe pressure ratio. Without a feedforward that floor starts from a closed valve, and the valve opens late.",
    example:
      "overspeed_guard: { gain: 20.9 mm2/krpm, reference_speed: 158000 rpm, ... }   # and no feedforward",
    fix: "Add `feedforward`, or leave the guard to `trip`.",
  },
  "guard-margin-small": {
    severity: "warning",
    cause:
      "The trip acts `margin` below the limit. A margin smaller than the sensor's resolution plus the rise within one guard step lets the turbo pass the limit unseen.",
    example: "limit: 165000 rpm\nmargin: 0.5 %",
    fix: "Enlarge the margin, run the guard more often, or resolve the speed better.",
  },
  "reference-above-ceiling": {
    severity: "warning",
    cause: "The proportional guard starts where the trip already acts, so it never helps.",
    example: "limit: 165000 rpm\nmargin: 3 %\nreference_speed: 162000 rpm",
    fix: "Lower the reference speed below limit * (1 - margin).",
  },
  "release-above-ceiling": {
    severity: "error",
    cause: "The trip would be released at a speed at which it acts again, and chatter.",
    example: "limit: 165000 rpm\nmargin: 3 %\ntrip: { release_below: 162000 rpm, ... }",
    fix: "Release well below limit * (1 - margin).",
  },
  "opening-below-half": {
    severity: "error",
    cause:
      "The overspeed trip opens the wastegate to the end of the actuator's range. Less than half of the gate's opening may not hold the turbo.",
    example: "actuator: { opening: 0 % to 40 %, ... }\noverspeed_guard: { ... }",
    fix: "Give the range that the gate can travel: `opening: 0 % to 100 %`.",
  },
  "safe-opening-below-half": {
    severity: "warning",
    cause: "In fail-safe the wastegate goes to its safe opening; less than half open may leave boost on.",
    example: "safe_opening: 20 %",
    fix: "Use the whole opening, `safe_opening: 100 %`, unless the plant shows that less is enough.",
  },
  "torque-not-limited": {
    severity: "warning",
    cause: "A torque limit of 100 % is no limit, so the trip or fail-safe acts through the wastegate alone.",
    example: "trip: { torque: 100 %, ... }\nfail_safe: { torque: 100 % }",
    fix: "Limit torque to what the engine gives without boost, for example `torque: 40 %`.",
  },
  "lead-long": {
    severity: "warning",
    cause:
      "The guard predicts turbo speed along a straight line. More than a second ahead that line is no prediction, and the guard acts in every tip-in.",
    example: "lead: 2 s",
    fix: "Use about the dead time of valve and turbo: `lead: 120 ms`.",
  },
  "limit-above-plant": {
    severity: "warning",
    cause: "The guard protects a higher speed than the turbo of the plant file stands.",
    example: "limit: 180000 rpm          # plant: speed_limit: 165 krpm",
    fix: "Use the turbo's limit.",
  },
  "slew-too-slow": {
    severity: "warning",
    cause: "The target's own slew takes longer than a requirement allows boost to take.",
    example: "slew: { rise: 50 kPa/s, fall: 1500 kPa/s }\nsettles: { band: 2.5 %, within: 1.2 s }",
    fix: "Let the target rise faster, or allow more time.",
  },
  "course-without-start": {
    severity: "error",
    cause: "A course says nothing about the value before its first point.",
    example: "accelerator: [{ at: 1 s, value: 100 % }]",
    fix: "Start the course at 0 s: `[{ at: 0 s, value: 20 % }, { at: 1 s, value: 100 % }]`.",
  },
  "course-out-of-order": {
    severity: "error",
    cause: "A point of a course may come before the point above it has finished.",
    example: "- { at: 2 s, value: 50 % }\n- { at: 1 s, value: 100 % }",
    fix: "Sort the points by time, and keep free times apart.",
  },
  "posed-target-above-ceiling": {
    severity: "warning",
    cause:
      "A scenario poses a target that the controller's own ceiling cuts, so the scenario does not test what it says.",
    example: "ceiling: 245 kPa abs\ntarget: 260 kPa abs         # in a scenario, and ceilings are on",
    fix: "Pose a target below the ceiling, or add `ceilings: off` to the scenario.",
  },
  "outside-validity": {
    severity: "warning",
    cause: "The scenario leaves the engine speeds at which the plant is believed; its runs would be flagged.",
    example: "engine_speed: 800 rpm      # plant: validity from 1000 rpm",
    fix: "Stay inside the validity, or widen it if the plant is believed there.",
  },
  "requirement-without-scenario": {
    severity: "warning",
    cause: "No scenario exercises the requirement, so it is never tested.",
    example: "requirements: [...]        # and no scenarios",
    fix: "Add a scenario, or name one.",
  },
  "compressor-map-inverted": {
    severity: "error",
    cause:
      "A speed line of the compressor would run backwards: its shut-off head above its peak, or its choke flow below the peak's flow.",
    example: "peak_head: 0.42\nshutoff_head: 0.62",
    fix: "Check the two values against the compressor map.",
  },
  "limit-outside-validity": {
    severity: "warning",
    cause: "At the turbo's speed limit the tip speed is beyond the validity the file states for itself.",
    example: "turbo: { count: 1, speed_limit: 200 krpm }\nvalidity: { tip_speed: 0 m/s to 560 m/s, ... }",
    fix: "Check wheel radius, limit and validity against each other.",
  },
} as const satisfies Record<string, Explanation>;
