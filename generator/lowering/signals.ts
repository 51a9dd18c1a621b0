import type { ControllerSpec, Duration, SignalName, SignalSpec } from "../../spec/index.ts";
import {
  compare,
  LIMITS,
  type Limits,
  put,
  putDerived,
  putSteps,
  putStruct,
  putUnused,
  type Sheet,
} from "./sheet.ts";
import { stepsIn } from "./steps.ts";

/** How a signal appears in the runtime's calibration. */
interface SignalPlace {
  readonly name: SignalName;
  readonly field: string;
  readonly unit: string;
  readonly limits: Limits;
  /** Field of the substitute, if the controller uses one. */
  readonly otherwise?: string;
}

const SLOW_SIGNALS: readonly SignalPlace[] = [
  {
    name: "engine_speed",
    field: "engineSpeed",
    unit: "rpm",
    limits: LIMITS.speed,
    otherwise: "engineSpeedOtherwiseRpm",
  },
  {
    name: "accelerator",
    field: "accelerator",
    unit: "ratio",
    limits: LIMITS.ratio,
    otherwise: "acceleratorOtherwiseRatio",
  },
  { name: "boost_pressure", field: "boostPressure", unit: "kPa", limits: LIMITS.pressure },
  {
    name: "ambient_pressure",
    field: "ambientPressure",
    unit: "kPa",
    limits: LIMITS.pressure,
    otherwise: "ambientPressureOtherwiseKpa",
  },
  { name: "charge_temperature", field: "chargeTemperature", unit: "K", limits: LIMITS.temperature },
  {
    name: "boost_ceiling_request",
    field: "boostCeilingRequest",
    unit: "kPa",
    limits: LIMITS.pressure,
    otherwise: "boostCeilingRequestOtherwiseKpa",
  },
];

const TURBO_SPEED: SignalPlace = {
  name: "turbo_speed",
  field: "turboSpeed",
  unit: "rpm",
  limits: LIMITS.speed,
};

/**
 * Fastest a turbo gains speed, rpm/s, for as long as its sensor is doubted: own choice, about 1.5 times the most that the
 * model engines show. A spec's `rate_above` replaces it where it is lower; a plausibility limit is often far higher.
 */
const MOST_TURBO_GAIN_RPM_PER_S = 300_000;

function putPlausibility(sheet: Sheet, place: SignalPlace, signal: SignalSpec, step: Duration): void {
  putStruct(sheet, place.field, (inner) => {
    put(inner, "low", signal.range.low, place.unit, place.limits);
    put(inner, "high", signal.range.high, place.unit, place.limits);
    putSteps(inner, "afterSteps", signal.fault.after, step);
    putSteps(inner, "healsAfterSteps", signal.fault.healsAfter, step);
  });
  compare(sheet, `${place.field}.high`, "above", `${place.field}.low`);
}

/** The change a rate allows over the counted window, so that rounding the window up does not tighten the check. */
function putRateCheck(sheet: Sheet, place: SignalPlace, signal: SignalSpec, step: Duration): void {
  const { rateAbove, rateWindow } = signal.fault;
  putStruct(sheet, `${place.field}Rate`, (inner) => {
    if (rateAbove === undefined || rateWindow === undefined) {
      putUnused(inner, "mostChange", "windowSteps");
      return;
    }
    const steps = Math.max(1, stepsIn(rateWindow, step));
    putDerived(inner, "mostChange", rateAbove.value * steps * step.value, place.unit, LIMITS.notNegative, {
      written: `${rateAbove.written} over ${rateWindow.written}`,
      at: rateAbove.at,
    });
    putDerived(
      inner,
      "windowSteps",
      steps,
      `steps of ${step.written}`,
      { low: 1, high: LIMITS.steps.high },
      rateWindow,
    );
  });
}

function putStuckCheck(sheet: Sheet, place: SignalPlace, signal: SignalSpec, step: Duration): void {
  const { stuckFor, stuckMoved } = signal.fault;
  putStruct(sheet, `${place.field}Stuck`, (inner) => {
    if (stuckFor === undefined || stuckMoved === undefined) {
      putUnused(inner, "steps", "moved");
      return;
    }
    putSteps(inner, "steps", stuckFor, step);
    put(inner, "moved", stuckMoved, "kPa", LIMITS.notNegative);
  });
}

function putFilter(sheet: Sheet, place: SignalPlace, signal: SignalSpec): void {
  if (signal.filter === undefined) {
    putUnused(sheet, `${place.field}FilterS`);
  } else {
    put(sheet, `${place.field}FilterS`, signal.filter, "s", LIMITS.seconds);
  }
}

function putUnusedSignal(sheet: Sheet, place: SignalPlace): void {
  putStruct(sheet, place.field, (inner) => putUnused(inner, "low", "high", "afterSteps", "healsAfterSteps"));
  putStruct(sheet, `${place.field}Rate`, (inner) => putUnused(inner, "mostChange", "windowSteps"));
  putStruct(sheet, `${place.field}Stuck`, (inner) => putUnused(inner, "steps", "moved"));
  putUnused(sheet, `${place.field}FilterS`);
}

function putSignal(sheet: Sheet, place: SignalPlace, signal: SignalSpec | undefined, step: Duration): void {
  if (signal === undefined) {
    putUnusedSignal(sheet, place);
  } else {
    putPlausibility(sheet, place, signal, step);
    putRateCheck(sheet, place, signal, step);
    putStuckCheck(sheet, place, signal, step);
    putFilter(sheet, place, signal);
  }
  if (place.otherwise !== undefined) {
    const substitute = signal?.otherwise ?? signal?.range.low;
    if (substitute === undefined) {
      putUnused(sheet, place.otherwise);
    } else {
      put(sheet, place.otherwise, substitute, place.unit, place.limits);
    }
  }
}

/** Calibration of every signal's conditioning. */
export function putSignals(sheet: Sheet, controller: ControllerSpec): void {
  for (const place of SLOW_SIGNALS) {
    putSignal(sheet, place, controller.signals[place.name], controller.step);
  }
  const turbo = controller.signals.turbo_speed;
  putSignal(sheet, TURBO_SPEED, turbo, controller.guardStep);
  const gain = mostTurboGain(turbo);
  putDerived(
    sheet,
    "turboSpeedGainPerStepRpm",
    gain.value * controller.guardStep.value,
    `rpm per step of ${controller.guardStep.written}`,
    LIMITS.speed,
    gain.from,
  );
}

/** Fastest assumed gain, rpm/s, and where it comes from. */
function mostTurboGain(turbo: SignalSpec | undefined) {
  const rate = turbo?.fault.rateAbove;
  if (rate !== undefined && rate.value < MOST_TURBO_GAIN_RPM_PER_S) return { value: rate.value, from: rate };
  const from =
    turbo === undefined ? undefined : { written: `${MOST_TURBO_GAIN_RPM_PER_S} rpm/s`, at: turbo.at };
  return { value: MOST_TURBO_GAIN_RPM_PER_S, from };
}
