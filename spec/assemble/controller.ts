import type {
  AntiWindupSpec,
  ControllerSpec,
  FeedbackSpec,
  Gain,
  OverspeedGuardSpec,
  PressureReference,
  ProportionalGuardSpec,
  SignalName,
  SignalSpec,
  TargetSpec,
} from "../controller-spec.ts";
import type { CurveSpec, Quantity, TableSpec } from "../quantity.ts";
import type { Span } from "../span.ts";
import type { CONTROLLER_BLOCK } from "../table/controller-table.ts";
import type { Placed, Value } from "../table/kind.ts";
import { defined } from "./defined.ts";

type Controller = Value<typeof CONTROLLER_BLOCK, "whole">;
type Feedback = Controller["feedback"];
type Guard = NonNullable<Controller["overspeedGuard"]>;

/** The controller as the other folders take it, from what was read without an error. */
export function assembleController(read: Controller): ControllerSpec {
  return {
    name: read.name,
    description: read.description,
    step: read.step,
    guardStep: read.guardStep ?? read.step,
    precision: read.precision,
    signals: assembleSignals(read.signals),
    target: assembleTarget(read.target),
    ...defined({
      wastegateArea: read.wastegate?.effectiveArea,
      feedforward: read.feedforward,
      overspeedGuard: read.overspeedGuard && assembleGuard(read.overspeedGuard),
    }),
    feedback: assembleFeedback(read.feedback),
    actuator: {
      opening: read.actuator.opening,
      slewOpen: read.actuator.slew.open,
      slewClose: read.actuator.slew.close,
      safeOpening: read.actuator.safeOpening,
      restOpening: read.actuator.restOpening,
      onPowerLoss: read.actuator.onPowerLoss,
      at: read.actuator.span,
    },
    failSafe: assembleFailSafe(read),
    at: read.span,
  };
}

/** Torque limit of fail-safe: as given, else the trip's, else 40 %. */
function assembleFailSafe(read: Controller): ControllerSpec["failSafe"] {
  const { failSafe, overspeedGuard } = read;
  if (failSafe !== undefined) return { torque: failSafe.torque, at: failSafe.span };
  const usual: Quantity = { value: 0.4, written: "40 %", at: read.span };
  return { torque: overspeedGuard?.trip?.torque ?? usual, at: read.span };
}

const SIGNAL_KEYS = {
  engineSpeed: "engine_speed",
  accelerator: "accelerator",
  boostPressure: "boost_pressure",
  ambientPressure: "ambient_pressure",
  chargeTemperature: "charge_temperature",
  inletTemperature: "inlet_temperature",
  manifoldPressure: "manifold_pressure",
  turboSpeed: "turbo_speed",
  boostCeilingRequest: "boost_ceiling_request",
} as const satisfies Record<string, SignalName>;

function assembleSignals(read: Controller["signals"]): ControllerSpec["signals"] {
  const present = (Object.keys(SIGNAL_KEYS) as (keyof typeof SIGNAL_KEYS)[]).flatMap((key) => {
    const signal = read[key];
    return signal === undefined ? [] : [assembleSignal(SIGNAL_KEYS[key], signal)];
  });
  return Object.fromEntries(present.map((signal) => [signal.name, signal]));
}

type Signal = Controller["signals"]["engineSpeed"];

function assembleSignal(name: SignalName, { range, otherwise, filter, fault, span }: Signal): SignalSpec {
  const { after, healsAfter, rateAbove, rateWindow, stuckFor, stuckMoved } = fault;
  return {
    name,
    range,
    ...defined({ otherwise, filter }),
    fault: { after, healsAfter, rateWindow, stuckMoved, ...defined({ rateAbove, stuckFor }) },
    at: span,
  };
}

/** What the target table holds, from the unit it is written in. */
function referenceOf(boost: TableSpec): PressureReference {
  if (boost.unit === "") return "pressure_ratio";
  return boost.unit.endsWith("gauge") ? "gauge" : "absolute";
}

function assembleTarget(read: Controller["target"]): TargetSpec {
  const { boost, airCompensation, ceiling, pressureRatioCeiling, leastBoost, slew, span } = read;
  return {
    boost,
    reference: referenceOf(boost),
    ...defined({ airCompensation: airCompensation && placed(airCompensation), pressureRatioCeiling }),
    ceiling,
    leastBoost,
    slewRise: slew.rise,
    slewFall: slew.fall,
    at: span,
  };
}

type Spanned<T> = T extends Placed ? Omit<T, keyof Placed> & { readonly at: Span } : never;

function placed<T extends Placed>(read: T): Spanned<T> {
  const { places: _places, span, ...rest } = read;
  return { ...rest, at: span } as Spanned<T>;
}

const gainOf = (read: Quantity | CurveSpec): Gain =>
  "axis" in read ? { kind: "curve", curve: read } : { kind: "number", quantity: read };

function assembleFeedback(read: Feedback): FeedbackSpec {
  const { integral, derivative, derivativeFilter } = read;
  return {
    coordinate: read.coordinate,
    schedule: read.schedule,
    proportional: gainOf(read.proportional),
    ...defined({
      integral: integral && gainOf(integral),
      derivative: derivative && gainOf(derivative),
      derivativeFilter,
    }),
    setpointWeight: read.setpointWeight,
    trimLimits: read.trimLimits,
    antiWindup: assembleAntiWindup(read),
    at: read.span,
  };
}

function assembleAntiWindup({ antiWindup, span }: Feedback): AntiWindupSpec {
  if (antiWindup === undefined) return { method: "none", at: span };
  if (antiWindup.method === "none") return { method: "none", at: antiWindup.span };
  return placed(antiWindup);
}

function assembleGuard(read: Guard): OverspeedGuardSpec {
  return {
    limit: read.limit,
    margin: read.margin,
    ...defined({ proportional: proportionalPart(read), trip: read.trip && placed(read.trip) }),
    at: read.span,
  };
}

function proportionalPart(read: Guard): ProportionalGuardSpec | undefined {
  const { gain, referenceSpeed } = read;
  if (gain === undefined || referenceSpeed === undefined) return undefined;
  return {
    lead: read.lead,
    accelerationWindow: read.accelerationWindow,
    referenceSpeed,
    gain,
    integralRate: read.integralRate,
    safePressureRatio: read.safePressureRatio,
    targetReduction: read.targetReduction,
    targetRelease: read.targetRelease,
  };
}
