import type { TraceSignal } from "../../../spec/index.ts";
import type { Limits } from "../../evidence.ts";
import type { LineRole } from "./line-style.ts";

export interface PanelLine {
  readonly signal: TraceSignal;
  readonly name: string;
  readonly role: LineRole;
}

export interface PanelLimit {
  readonly name: string;
  readonly role: LineRole;
  /** In the signal's base unit. */
  readonly from: (limits: Partial<Limits>) => number | undefined;
}

/** A chart of a trace: signals of one unit, and the limits drawn across them. */
export interface Panel {
  readonly title: string;
  readonly height: number;
  /** Base units per unit shown: 1000 shows rpm as 1000 rpm. */
  readonly per: number;
  /** Shown range, when it is the same for every run. */
  readonly range?: readonly [number, number];
  /** Least span shown, so that noise does not fill the chart. */
  readonly leastSpan: number;
  readonly lines: readonly PanelLine[];
  readonly limits: readonly PanelLimit[];
}

export const PANELS: readonly Panel[] = [
  {
    title: "boost, kPa abs",
    height: 190,
    per: 1,
    leastSpan: 20,
    lines: [
      { signal: "boost_wanted", name: "wanted", role: "wanted" },
      { signal: "boost_target", name: "target followed", role: "followed" },
      { signal: "boost_pressure", name: "boost", role: "actual" },
    ],
    limits: [{ name: "boost ceiling", role: "soft_limit", from: (limits) => limits.boostCeilingKpa }],
  },
  {
    title: "wastegate, % open",
    height: 130,
    per: 0.01,
    range: [-4, 104],
    leastSpan: 100,
    lines: [
      { signal: "wastegate_command", name: "command", role: "command" },
      { signal: "wastegate_opening", name: "opening", role: "actual" },
    ],
    limits: [],
  },
  {
    title: "turbo speed, 1000 rpm",
    height: 170,
    per: 1000,
    leastSpan: 20,
    lines: [{ signal: "turbo_speed", name: "speed", role: "actual" }],
    limits: [
      { name: "mechanical limit", role: "limit", from: (limits) => limits.turboSpeedLimitRpm },
      { name: "trip", role: "command", from: (limits) => limits.tripSpeedRpm },
      { name: "guard reference", role: "soft_limit", from: (limits) => limits.guardReferenceSpeedRpm },
    ],
  },
  {
    title: "request and limit, %",
    height: 120,
    per: 0.01,
    range: [-4, 104],
    leastSpan: 100,
    lines: [
      { signal: "torque_limit", name: "torque limit", role: "actual" },
      { signal: "accelerator", name: "accelerator", role: "input" },
    ],
    limits: [],
  },
  {
    title: "engine speed, 1000 rpm",
    height: 110,
    per: 1000,
    leastSpan: 1,
    lines: [{ signal: "engine_speed", name: "engine speed", role: "actual" }],
    limits: [],
  },
];
