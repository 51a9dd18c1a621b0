/* specimen.ts - Every operator and statement once; no controller
 * The twin of specimen.c: same names, same order, same bits at float32.
 * Generated from specimen.yaml, meaning 3c6a8279d628d160. Edit that file instead of this one.
 * Values put into inputs and calibrations must be rounded to the precision already (Math.fround at float32).
 * Contents: 1 types  2 helpers and constants  3 blocks in run order  4 init and steps  5 calibration and data */

/* ---- 1 types ------------------------------------------------------------------------------------- */
export type specimen_phase_t = "idle" | "busy" | "done";

export interface specimen_limits_t {
    low: number;
    high: number;
}

export interface specimen_calibration_t {
    /* Output over input. */
    curve_axis: number[];
    curve_values: number[];
    limits: specimen_limits_t;
    steps: number;
    armed: boolean;
}

export interface specimen_inner_t {
    value: number;
    primed: boolean;
}

export interface specimen_state_t {
    inner: specimen_inner_t;
    phase: specimen_phase_t;
    history: number[];
    next: number;
}

export interface specimen_exchange_t {
    level: number;
}

export interface specimen_input_t {
    value_kpa: number;
    enable: boolean;
}

export interface specimen_output_t {
    result_kpa: number;
    phase: specimen_phase_t;
    count: number;
    flag: boolean;
}

/* ---- 2 helpers and constants: comparisons, not Math.min or Math.max, so NaN and -0 act as in C --- */
const f = Math.fround;
const is_finite = (x: number): boolean => x - x === 0;
const same = (a: number, b: number): boolean => is_finite(a) && is_finite(b) && !(a < b) && !(a > b);
const min_of = (a: number, b: number): number => (a < b ? a : b);
const max_of = (a: number, b: number): number => (a > b ? a : b);
const clamp = (x: number, low: number, high: number): number => (x > high ? high : x >= low ? x : low);
const to_count = (x: number, low: number, high: number): number => (x >= high ? high : x > low ? x | 0 : low);
const HISTORY_STEPS = 4; /* 4 steps */
const GAIN = 0.10000000149011612; /* 0.1; Gain on the curve, no unit. */
const STEP_S = 0.009999999776482582; /* 0.01 s */

/* ---- 3 blocks ------------------------------------------------------------------------------------ */

/* The index when the value is the first bad one: not a number, or outside low .. high. */
function bad_real(value: number, low: number, high: number, index: number, so_far: number): number {
    return ((so_far < 0) && !((value >= low) && (value <= high))) ? index : so_far;
}

/* The index when the value is the first bad one: not a number, or outside low .. high. */
function bad_count(value: number, low: number, high: number, index: number, so_far: number): number {
    return ((so_far < 0) && ((value < low) || (value > high))) ? index : so_far;
}

/* The index when its value is the first bad one: lower is not less than upper. */
function bad_rise(lower: number, upper: number, index: number, so_far: number): number {
    return ((so_far < 0) && !(lower < upper)) ? index : so_far;
}

/* As bad_real, for an array whose first value has the index. */
function bad_array(values: readonly number[], low: number, high: number, index: number,
    so_far: number): number {
    let bad: number = so_far;
    for (let i = 0; i < values.length; i++) {
        if ((bad < 0) && !((values[i] >= low) && (values[i] <= high))) {
            bad = (index + i) | 0;
        }
    }
    return bad;
}

/* Index of the first value of an axis that is not greater than the one before it. */
function bad_axis(values: readonly number[], index: number, so_far: number): number {
    let bad: number = so_far;
    for (let i = 1; i < values.length; i++) {
        if ((bad < 0) && !(values[i] > values[(i - 1) | 0])) {
            bad = (index + i) | 0;
        }
    }
    return bad;
}

/* Keeps the newest value; `x` enters the ring of `history`. */
function remember(state: specimen_state_t, x: number): void {
    state.history[state.next] = x;
    state.next = (((state.next + 1) | 0) >= HISTORY_STEPS) ? 0 : ((state.next + 1) | 0);
}

function look(curve_axis: readonly number[], curve_values: readonly number[], x: number): number {
    let value: number = curve_values[0];
    for (let i = 0; i < curve_axis.length; i++) {
        if (x >= curve_axis[i]) {
            value = curve_values[i];
        }
    }
    return value;
}

function settle(inner: specimen_inner_t, x: number, step_s: number): number {
    if (!inner.primed) {
        inner.value = x;
        inner.primed = true;
    }
    inner.value = f(inner.value + f(f(x - inner.value) * step_s));
    return inner.value;
}

/* Whole-number arithmetic.
 *   n = (2 - a) b + 1, negated
 */
function count_things(a: number, b: number): number {
    const n = (Math.imul((2 - a) | 0, b) + 1) | 0;
    const small = ((n < 3) || (a <= 4)) && !(b > 100) && !(a >= 200);
    return (small && (n !== 5) && !(n === 6)) ? (-n | 0) : n;
}

function next_phase(phase: specimen_phase_t, enable: boolean): specimen_phase_t {
    let next: specimen_phase_t = phase;
    switch (phase) {
        case "idle":
            next = enable ? "busy" : "idle";
            break;
        case "busy":
        case "done":
            if (enable) {
                next = "done";
            } else if (phase !== "done") {
                next = "idle";
            } else {
                /* nothing to do */
            }
            break;
        default:
            break;
    }
    return next;
}

/* Both sides of each comparison of reals, and what NaN does to them. */
function compare_reals(a: number, b: number): boolean {
    const ordered = ((a < b) || (a <= b)) && !(a > b);
    return (ordered !== (a >= b)) || (same(a, b) === is_finite(a));
}

/* ---- 4 init and steps ---------------------------------------------------------------------------- */

/* Sets everything as after power-on. */
export function specimen_init(state: specimen_state_t, exchange: specimen_exchange_t): void {
    state.inner.value = 0;
    state.inner.primed = false;
    state.phase = "idle";
    state.next = 0;
    for (let i = 0; i < HISTORY_STEPS; i++) {
        state.history[i] = -0;
    }
    exchange.level = 0;
}

/* The slow step of the specimen. */
export function specimen_step_slow(calibration: specimen_calibration_t, state: specimen_state_t,
    exchange: specimen_exchange_t, input: specimen_input_t, output: specimen_output_t): void {
    const level = exchange.level;
    const raw = clamp(input.value_kpa, calibration.limits.low, calibration.limits.high);
    const looked = look(calibration.curve_axis, calibration.curve_values, raw);
    /* the root of the distance, and its sign turned */
    const root = f(Math.sqrt(Math.abs(f(f(looked * GAIN) - level))));
    const settled = settle(state.inner, -root, STEP_S);
    remember(state, settled);
    const result = f(min_of(max_of(settled, raw), 1000000) / 3);
    const whole = to_count(result, -1000, 1000);
    const counted = count_things(whole, calibration.steps);
    const busy = state.phase === "busy";
    state.phase = next_phase(state.phase, calibration.armed && input.enable);
    output.result_kpa = busy ? result : f(counted);
    output.phase = busy ? "busy" : state.phase;
    output.count = busy ? counted : whole;
    output.flag = busy ? compare_reals(raw, level) : state.inner.primed;
}

/* The fast step of the specimen. */
export function specimen_step_fast(state: specimen_state_t, exchange: specimen_exchange_t): void {
    exchange.level = state.history[0];
}

/* Looks at every calibration value: finite, within its range, axes and pairs in order. */
export function specimen_check_calibration(calibration: specimen_calibration_t): number {
    let bad: number = -1;
    bad = bad_array(calibration.curve_axis, -3.4028234663852886e+38 /* -3.4028235e+38 */,
        3.4028234663852886e+38 /* 3.4028235e+38 */, 0, bad);
    bad = bad_axis(calibration.curve_axis, 0, bad);
    bad = bad_array(calibration.curve_values, -3.4028234663852886e+38 /* -3.4028235e+38 */,
        3.4028234663852886e+38 /* 3.4028235e+38 */, 3, bad);
    bad = bad_real(calibration.limits.low, -100, 0, 6, bad);
    bad = bad_real(calibration.limits.high, 0, 1000, 7, bad);
    bad = bad_rise(calibration.limits.low, calibration.limits.high, 7, bad);
    bad = bad_count(calibration.steps, 0, 1000, 8, bad);
    return bad;
}

/* ---- 5 calibration and data ---------------------------------------------------------------------- */

export function create_calibration(): specimen_calibration_t {
    return {
        curve_axis: [0, 50, 100],
        curve_values: [0.10000000149011612, 7, 12.5],
        limits: { low: -20, high: 300.1000061035156 /* 300.1 */ },
        steps: 3,
        armed: true,
    };
}

export function create_state(): specimen_state_t {
    return {
        inner: { value: 0, primed: false },
        phase: "idle",
        history: [0, 0, 0, 0],
        next: 0,
    };
}

export function create_exchange(): specimen_exchange_t {
    return {
        level: 0,
    };
}

export function create_input(): specimen_input_t {
    return {
        value_kpa: 0,
        enable: false,
    };
}

export function create_output(): specimen_output_t {
    return {
        result_kpa: 0,
        phase: "idle",
        count: 0,
        flag: false,
    };
}
