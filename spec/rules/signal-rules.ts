import type { Report } from "../diagnostics/report.ts";
import type { PlantSpec } from "../plant-spec.ts";
import type { Span } from "../span.ts";
import type { Placed } from "../table/kind.ts";
import { startOf } from "../text/positions.ts";
import { type Controller, type Rule, type Seen, short, writtenAt } from "./rule.ts";

/** Signals: which are needed, and what their sensors can show. */
export const checkSignals: Rule = (seen, report) => {
  checkNeeded(seen, report);
  checkBoostRange(seen, report);
  checkRateWindows(seen, report);
  checkFaultKeys(seen, report);
};

function checkNeeded({ controller }: Seen, report: Report): void {
  const { signals, target, overspeedGuard } = controller;
  if (signals === undefined) return;
  const need = (user: string, block: Placed | undefined, key: string, fix: string): void => {
    if (block === undefined || writtenAt(signals, key) !== undefined) return;
    report({
      code: "missing-signal",
      at: startOf(block.span),
      message: `\`${user}\` needs the signal \`${key}\``,
      label: `\`signals\` has no \`${key}\``,
      because: [{ at: startOf(signals.span), message: "the signals" }],
      fix: `${key}: ${fix}`,
    });
  };
  need("overspeed_guard", overspeedGuard, "turbo_speed", "{ range: 0 rpm to 230000 rpm }");
  need(
    "air_compensation",
    target?.airCompensation,
    "charge_temperature",
    "{ range: -40 degC to 150 degC, otherwise: 25 degC }",
  );
}

/** A target beyond the sensor's range would make every reading near it suspect. */
function checkBoostRange({ controller: { signals, target } }: Seen, report: Report): void {
  const range = signals?.boostPressure?.range;
  const ceiling = target?.ceiling;
  if (range === undefined || ceiling === undefined || range.high.value > ceiling.value) return;
  report({
    code: "range-too-small",
    at: range.high.at,
    message: `\`boost_pressure\` is believed up to ${range.high.written}, which is not above the target's ceiling of ${ceiling.written}`,
    label: `must be above ${ceiling.written}`,
    because: [{ at: ceiling.at, message: "the ceiling" }],
    fix: `range: ${signals?.boostPressure?.range?.low.written} to 350 kPa abs`,
  });
}

type SignalKey = Exclude<keyof NonNullable<Controller["signals"]>, "span" | "places">;
const FAST_SIGNALS: readonly SignalKey[] = ["turboSpeed"];
const SIGNAL_KEYS: readonly SignalKey[] = [
  "engineSpeed",
  "accelerator",
  "boostPressure",
  "ambientPressure",
  "chargeTemperature",
  "inletTemperature",
  "manifoldPressure",
  "turboSpeed",
  "boostCeilingRequest",
];

/** Smallest change that a sensor of the plant shows, in the controller's unit. */
function quantumOf(key: SignalKey, plant: PlantSpec | undefined): number | undefined {
  if (plant === undefined) return undefined;
  if (key === "turboSpeed") return speedQuantum(plant);
  if (key !== "boostPressure" && key !== "ambientPressure" && key !== "manifoldPressure") return undefined;
  const { range, bits } = plant.sensors[key];
  return (range[1] - range[0]) / 2 ** bits / 1000;
}

/** rpm: one pulse more or less in the window. */
export function speedQuantum({ sensors: { turboSpeed } }: PlantSpec): number {
  return 60 / (turboSpeed.pulsesPerRevolution * turboSpeed.window);
}

/** A single quantum over the window must stay far below the rate that is suspect. */
const QUANTA_IN_RATE = 4;

function checkRateWindows({ controller, plant }: Seen, report: Report): void {
  for (const key of SIGNAL_KEYS) {
    const signal = controller.signals?.[key];
    const { rateAbove, rateWindow } = signal?.fault ?? {};
    if (rateAbove === undefined || rateWindow === undefined) continue;
    const step = FAST_SIGNALS.includes(key) ? (controller.guardStep ?? controller.step) : controller.step;
    const at = writtenAt(signal?.fault, "rate_window") ?? rateAbove.at;
    if (step !== undefined && rateWindow.value < step.value)
      report({
        code: "rate-window-short",
        at,
        message: `the rate is taken over ${rateWindow.written}, shorter than the step of ${step.written}`,
        label: "at least one step",
        because: [{ at: step.at, message: "the step the signal is read in" }],
        fix: `rate_window: ${step.written}`,
      });
    else checkQuantum(key, rateAbove.value, rateWindow, at, plant, report);
  }
}

function checkQuantum(
  key: SignalKey,
  rate: number,
  window: { readonly value: number; readonly written: string },
  at: Span,
  plant: PlantSpec | undefined,
  report: Report,
): void {
  const quantum = quantumOf(key, plant);
  if (quantum === undefined || quantum / window.value < rate / QUANTA_IN_RATE) return;
  const enough = Math.ceil(((QUANTA_IN_RATE * quantum) / rate) * 1000 + 1e-9);
  report({
    code: "rate-window-short",
    at,
    message: `one quantum of the sensor (${short(quantum)}) within ${window.written} is a rate of ${short(quantum / window.value)} per second, a quarter of \`rate_above\` or more`,
    label: `at least ${enough} ms`,
    fix: `rate_window: ${enough} ms`,
  });
}

function checkFaultKeys({ controller }: Seen, report: Report): void {
  for (const key of SIGNAL_KEYS) {
    const fault = controller.signals?.[key]?.fault;
    for (const [extra, needed] of [
      ["rate_window", "rate_above"],
      ["stuck_moved", "stuck_for"],
    ] as const) {
      const at = writtenAt(fault, extra);
      if (at === undefined || writtenAt(fault, needed) !== undefined) continue;
      report({
        code: "no-effect",
        at,
        message: `\`${extra}\` has no effect without \`${needed}\``,
        fix: `remove \`${extra}\`, or add \`${needed}\``,
      });
    }
  }
}
