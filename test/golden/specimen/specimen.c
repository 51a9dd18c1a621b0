/* specimen.c - the controller; every + - * / below rounds once, at float32
 * Every operator and statement once; no controller
 * Generated from specimen.yaml, meaning 3c6a8279d628d160. Edit that file instead of this one.
 * Contents: 1 assumptions  2 helpers and constants  3 blocks in run order  4 init and steps
 */
#include "specimen.h"

#include <float.h>
#include <math.h>

/* ---- 1 assumptions ------------------------------------------------------------------------------- */
#if (SPECIMEN_STEP_SLOW_PERIOD_US != 10000)
#error "specimen.h was not generated together with this file: SPECIMEN_STEP_SLOW_PERIOD_US must be 10000"
#endif
#if (SPECIMEN_STEP_FAST_PERIOD_US != 1250)
#error "specimen.h was not generated together with this file: SPECIMEN_STEP_FAST_PERIOD_US must be 1250"
#endif
#if defined(__FAST_MATH__)
#error "build specimen without -ffast-math and with -ffp-contract=off"
#endif
#if defined(__FINITE_MATH_ONLY__)
#if (__FINITE_MATH_ONLY__ != 0)
#error "build specimen without -ffinite-math-only"
#endif
#endif
#if !defined(FLT_EVAL_METHOD)
#error "specimen needs a compiler that states FLT_EVAL_METHOD (C99)"
#elif (FLT_EVAL_METHOD != 0)
#error "specimen must be evaluated without extra precision"
#endif
#if defined(FLT_RADIX)
#if (FLT_RADIX != 2)
#error "specimen needs IEEE 754 arithmetic: FLT_RADIX must be 2"
#endif
#endif
#if defined(FLT_MANT_DIG)
#if (FLT_MANT_DIG != 24)
#error "specimen needs IEEE 754 arithmetic: FLT_MANT_DIG must be 24"
#endif
#endif
#if defined(FLT_MAX_EXP)
#if (FLT_MAX_EXP != 128)
#error "specimen needs IEEE 754 arithmetic: FLT_MAX_EXP must be 128"
#endif
#endif
/* No fused multiply-add, which rounds once where two roundings are meant. gcc ignores the standard pragma. */
#if defined(__clang__)
#pragma STDC FP_CONTRACT OFF
#elif defined(__GNUC__)
#pragma GCC optimize ("fp-contract=off")
#else
#pragma STDC FP_CONTRACT OFF
#endif

/* ---- 2 helpers and constants: comparisons, not fminf or fmaxf, so NaN and -0 act alike everywhere --- */
#define HISTORY_STEPS (4) /* 4 steps */
#define GAIN (0x1.99999ap-4f) /* 0.1; Gain on the curve, no unit. */
#define STEP_S (0x1.47ae14p-7f) /* 0.01 s */

static bool is_finite(float x)
{
    return fabsf(x) <= FLT_MAX;
}

static bool same(float a, float b)
{
    return is_finite(a) && is_finite(b) && !(a < b) && !(a > b);
}

static float min_of(float a, float b)
{
    return (a < b) ? a : b;
}

static float max_of(float a, float b)
{
    return (a > b) ? a : b;
}

static float clamp(float x, float low, float high)
{
    return (x > high) ? high : ((x >= low) ? x : low);
}

static bool both_or_none(bool a, bool b)
{
    return a == b;
}

static bool one_of_two(bool a, bool b)
{
    return a != b;
}

static int32_t to_count(float x, int32_t low, int32_t high)
{
    return (x >= (float)high) ? high : ((x > (float)low) ? (int32_t)x : low);
}

/* ---- 3 blocks ------------------------------------------------------------------------------------ */

/* The index when the value is the first bad one: not a number, or outside low .. high. */
static int32_t bad_real(float value, float low, float high, int32_t index, int32_t so_far)
{
    return ((so_far < 0) && !((value >= low) && (value <= high))) ? index : so_far;
}

/* The index when the value is the first bad one: not a number, or outside low .. high. */
static int32_t bad_count(int32_t value, int32_t low, int32_t high, int32_t index, int32_t so_far)
{
    return ((so_far < 0) && ((value < low) || (value > high))) ? index : so_far;
}

/* The index when its value is the first bad one: lower is not less than upper. */
static int32_t bad_rise(float lower, float upper, int32_t index, int32_t so_far)
{
    return ((so_far < 0) && !(lower < upper)) ? index : so_far;
}

/* As bad_real, for an array whose first value has the index. */
static int32_t bad_array(const float values[], int32_t values_count, float low, float high, int32_t index,
    int32_t so_far)
{
    int32_t bad = so_far;
    for (int32_t i = 0; i < values_count; i++) {
        if ((bad < 0) && !((values[i] >= low) && (values[i] <= high))) {
            bad = index + i;
        }
    }
    return bad;
}

/* Index of the first value of an axis that is not greater than the one before it. */
static int32_t bad_axis(const float values[], int32_t values_count, int32_t index, int32_t so_far)
{
    int32_t bad = so_far;
    for (int32_t i = 1; i < values_count; i++) {
        if ((bad < 0) && !(values[i] > values[i - 1])) {
            bad = index + i;
        }
    }
    return bad;
}

/* Keeps the newest value; `x` enters the ring of `history`. */
static void remember(specimen_state_t *state, float x)
{
    state->history[state->next] = x;
    state->next = ((state->next + 1) >= HISTORY_STEPS) ? 0 : (state->next + 1);
}

static float look(const float curve_axis[], int32_t curve_axis_count, const float curve_values[], float x)
{
    float value = curve_values[0];
    for (int32_t i = 0; i < curve_axis_count; i++) {
        if (x >= curve_axis[i]) {
            value = curve_values[i];
        }
    }
    return value;
}

static float settle(specimen_inner_t *inner, float x, float step_s)
{
    if (!inner->primed) {
        inner->value = x;
        inner->primed = true;
    }
    inner->value = inner->value + ((x - inner->value) * step_s);
    return inner->value;
}

/* Whole-number arithmetic.
 *   n = (2 - a) b + 1, negated
 */
static int32_t count_things(int32_t a, int32_t b)
{
    const int32_t n = ((2 - a) * b) + 1;
    const bool small = ((n < 3) || (a <= 4)) && !(b > 100) && !(a >= 200);
    return (small && (n != 5) && !(n == 6)) ? -n : n;
}

static specimen_phase_t next_phase(specimen_phase_t phase, bool enable)
{
    specimen_phase_t next = phase;
    switch (phase) {
        case SPECIMEN_PHASE_IDLE:
            next = enable ? SPECIMEN_PHASE_BUSY : SPECIMEN_PHASE_IDLE;
            break;
        case SPECIMEN_PHASE_BUSY:
        case SPECIMEN_PHASE_DONE:
            if (enable) {
                next = SPECIMEN_PHASE_DONE;
            } else if (phase != SPECIMEN_PHASE_DONE) {
                next = SPECIMEN_PHASE_IDLE;
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
static bool compare_reals(float a, float b)
{
    const bool ordered = ((a < b) || (a <= b)) && !(a > b);
    return one_of_two(ordered, a >= b) || both_or_none(same(a, b), is_finite(a));
}

/* ---- 4 init and steps ---------------------------------------------------------------------------- */

/* Sets everything as after power-on. */
void specimen_init(specimen_state_t *state, specimen_exchange_t *exchange)
{
    state->inner.value = 0.0f;
    state->inner.primed = false;
    state->phase = SPECIMEN_PHASE_IDLE;
    state->next = 0;
    for (int32_t i = 0; i < HISTORY_STEPS; i++) {
        state->history[i] = -0.0f;
    }
    exchange->level = 0.0f;
}

/* The slow step of the specimen. */
void specimen_step_slow(const specimen_calibration_t *calibration, specimen_state_t *state,
    const specimen_exchange_t *exchange, const specimen_input_t *input, specimen_output_t *output)
{
    const float level = exchange->level;
    const float raw = clamp(input->value_kpa, calibration->limits.low, calibration->limits.high);
    const float looked = look(calibration->curve_axis, 3, calibration->curve_values, raw);
    /* the root of the distance, and its sign turned */
    const float root = sqrtf(fabsf((looked * GAIN) - level));
    const float settled = settle(&state->inner, -root, STEP_S);
    remember(state, settled);
    const float result = min_of(max_of(settled, raw), 1000000.0f) / 3.0f;
    const int32_t whole = to_count(result, -1000, 1000);
    const int32_t counted = count_things(whole, calibration->steps);
    const bool busy = state->phase == SPECIMEN_PHASE_BUSY;
    state->phase = next_phase(state->phase, calibration->armed && input->enable);
    output->result_kpa = busy ? result : (float)counted;
    output->phase = busy ? SPECIMEN_PHASE_BUSY : state->phase;
    output->count = busy ? counted : whole;
    output->flag = busy ? compare_reals(raw, level) : state->inner.primed;
}

/* The fast step of the specimen. */
void specimen_step_fast(const specimen_state_t *state, specimen_exchange_t *exchange)
{
    exchange->level = state->history[0];
}

/* Looks at every calibration value: finite, within its range, axes and pairs in order. */
int32_t specimen_check_calibration(const specimen_calibration_t *calibration)
{
    int32_t bad = -1;
    bad = bad_array(calibration->curve_axis, 3, -0x1.fffffep+127f /* -3.4028235e+38 */,
        0x1.fffffep+127f /* 3.4028235e+38 */, 0, bad);
    bad = bad_axis(calibration->curve_axis, 3, 0, bad);
    bad = bad_array(calibration->curve_values, 3, -0x1.fffffep+127f /* -3.4028235e+38 */,
        0x1.fffffep+127f /* 3.4028235e+38 */, 3, bad);
    bad = bad_real(calibration->limits.low, -100.0f, 0.0f, 6, bad);
    bad = bad_real(calibration->limits.high, 0.0f, 1000.0f, 7, bad);
    bad = bad_rise(calibration->limits.low, calibration->limits.high, 7, bad);
    bad = bad_count(calibration->steps, 0, 1000, 8, bad);
    return bad;
}
