import { check, integer, property, tuple } from "fast-check";
import type { ScenarioSpec } from "../../spec/index.ts";
import type { Draw } from "../draw.ts";
import { freeValues } from "../fix-scenario.ts";
import { type Grid, gridOver, gridValue, nearestOnGrid } from "./grid.ts";

export interface Shrunk {
  readonly draw: Draw;
  /** Margin of the shrunk run; negative. */
  readonly margin: number;
  readonly simulations: number;
}

/** The margin of one requirement on the run of a draw; undefined: not exercised. */
export type MarginOf = (draw: Draw) => number | undefined;

/** Steps per range, from round to fine: the first at which the rounded run still violates is used. */
const DIVISIONS = [20, 200, 2000];
const SCATTER_STEPS = 10;
/** Simulations kept for shortening the run at the end. */
const FOR_SHORTENING = 10;

/**
 * The smallest manoeuvre found that still violates: nominal plant, no noise, no faults and round middle values where
 * they do not matter, and no longer than it must be. Deterministic; makes at most `budget` simulations.
 * Values become whole numbers on grids whose zero is the simplest, and fast-check's shrinking works on these.
 */
export function shrink(scenario: ScenarioSpec, start: Draw, marginOf: MarginOf, budget: number): Shrunk {
  const search = new Map<string, number | undefined>();
  const judge = (draw: Draw, most = budget): number | undefined => {
    const key = JSON.stringify(draw);
    if (!search.has(key) && search.size < most) search.set(key, marginOf(draw));
    return search.get(key);
  };
  const violates = (draw: Draw): boolean => (judge(draw) ?? 0) < 0;
  const violatesEarly = (draw: Draw): boolean => (judge(draw, budget - FOR_SHORTENING) ?? 0) < 0;
  if (!violates(start)) throw new Error("only a run that violates can be shrunk");

  const plain = simplifications(start).find(violatesEarly) ?? start;
  const grids = DIVISIONS.map((divisions) =>
    freeValues(scenario).map(({ free }) => gridOver(free, divisions)),
  );
  const rounded = grids
    .map((each) => ({ grids: each, draw: roundedTo(each, plain) }))
    .find(({ draw }) => violatesEarly(draw));
  const small = rounded ? smallestOnGrid(rounded.grids, rounded.draw, violatesEarly) : plain;
  const draw = shortest(scenario, small, violates);
  return { draw, margin: judge(draw) ?? Number.NaN, simulations: search.size };
}

/** What to try at once before anything is searched, boldest first. */
function simplifications(start: Draw): Draw[] {
  const nominal = start.scatter.map(() => 0);
  const noFaults = start.faults.map(() => false);
  const quiet = { noise: 0, scatter: nominal };
  return [
    { ...start, ...quiet, faults: noFaults },
    { ...start, ...quiet },
    { ...start, scatter: nominal },
    { ...start, noise: 0 },
  ];
}

function roundedTo(grids: readonly Grid[], draw: Draw): Draw {
  return decoded(grids, draw, encoded(grids, draw));
}

/** Whole numbers that stand for a draw: values, scatter, noise, faults. */
function encoded(grids: readonly Grid[], draw: Draw): number[] {
  return [
    ...draw.values.map((value, index) => nearestOnGrid(grids[index], value)),
    ...draw.scatter.map((share) => Math.floor(share * SCATTER_STEPS + 0.5)),
    draw.noise,
    ...draw.faults.map(Number),
  ];
}

function decoded(grids: readonly Grid[], draw: Draw, code: readonly number[]): Draw {
  const afterScatter = grids.length + draw.scatter.length;
  return {
    ...draw,
    values: grids.map((grid, index) => gridValue(grid, code[index])),
    scatter: code.slice(grids.length, afterScatter).map((k) => k / SCATTER_STEPS),
    noise: code[afterScatter],
    faults: code.slice(afterScatter + 1).map((kept) => kept === 1),
  };
}

function smallestOnGrid(grids: readonly Grid[], draw: Draw, violates: (draw: Draw) => boolean): Draw {
  const code = encoded(grids, draw);
  const wholes = tuple(
    ...grids.map(({ least, most }) => integer({ min: least, max: most })),
    ...draw.scatter.map(() => integer({ min: -SCATTER_STEPS, max: SCATTER_STEPS })),
    ...[draw.noise, ...draw.faults].map(() => integer({ min: 0, max: 1 })),
  );
  const found = check(
    property(wholes, (candidate) => !violates(decoded(grids, draw, candidate))),
    { examples: [[code]], numRuns: 1, seed: 0 },
  );
  return decoded(grids, draw, found.counterexample?.[0] ?? code);
}

/** Ends the run as early as it still violates, on a grid of 0.1 s, by bisection. */
function shortest(scenario: ScenarioSpec, draw: Draw, violates: (draw: Draw) => boolean): Draw {
  let best = draw;
  let low = 0;
  let high = Math.ceil((draw.duration ?? scenario.duration.high) * 10);
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    const candidate = { ...draw, duration: middle / 10 };
    if (violates(candidate)) {
      best = candidate;
      high = middle;
    } else low = middle;
  }
  return best;
}
