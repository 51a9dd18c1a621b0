/* skarn_smallest.c - the controller; every + - * / below rounds once, at float32
 * PI boost loop of the Skarn Hill test rig (invented)
 * Generated from smallest.yaml, meaning HASH. Edit that file instead of this one.
 * Contents: 1 assumptions  2 helpers and constants  3 blocks in run order  4 init and steps
 */
#include "skarn_smallest.h"

#include <float.h>

/* ---- 1 assumptions ------------------------------------------------------------------------------- */
#if (SKARN_SMALLEST_STEP_BOOST_PERIOD_US != 10000)
#error "skarn_smallest.h was not generated together with this file: SKARN_SMALLEST_STEP_BOOST_PERIOD_US must be 10000"
#endif
#if (SKARN_SMALLEST_STEP_GUARD_PERIOD_US != 10000)
#error "skarn_smallest.h was not generated together with this file: SKARN_SMALLEST_STEP_GUARD_PERIOD_US must be 10000"
#endif
#if defined(__FAST_MATH__)
#error "build skarn_smallest without -ffast-math and with -ffp-contract=off"
#endif
#if defined(__FINITE_MATH_ONLY__)
#if (__FINITE_MATH_ONLY__ != 0)
#error "build skarn_smallest without -ffinite-math-only"
#endif
#endif
#if !defined(FLT_EVAL_METHOD)
#error "skarn_smallest needs a compiler that states FLT_EVAL_METHOD (C99)"
#elif (FLT_EVAL_METHOD != 0)
#error "skarn_smallest must be evaluated without extra precision"
#endif
#if defined(FLT_RADIX)
#if (FLT_RADIX != 2)
#error "skarn_smallest needs IEEE 754 arithmetic: FLT_RADIX must be 2"
#endif
#endif
#if defined(FLT_MANT_DIG)
#if (FLT_MANT_DIG != 24)
#error "skarn_smallest needs IEEE 754 arithmetic: FLT_MANT_DIG must be 24"
#endif
#endif
#if defined(FLT_MAX_EXP)
#if (FLT_MAX_EXP != 128)
#error "skarn_smallest needs IEEE 754 arithmetic: FLT_MAX_EXP must be 128"
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
#define STEP_S (0x1.47ae14p-7f) /* 0.01 s */
#define LEAST_BOOST_HYSTERESIS_KPA (2.0f) /* 2; Fall below the least boost that ends it, kPa. */

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

/* The index when its value is the first bad one: lower is greater than upper. */
static int32_t bad_order(float lower, float upper, int32_t index, int32_t so_far)
{
    return ((so_far < 0) && !(lower <= upper)) ? index : so_far;
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

static void initialise_signal(skarn_smallest_signal_state_t *state)
{
    state->last_good = 0.0f;
    state->has_good = false;
    state->failed = false;
    state->suspect_steps = 0;
    state->good_steps = 0;
}

static void initialise_slow_signals(skarn_smallest_slow_state_t *state)
{
    initialise_signal(&state->engine_speed);
    initialise_signal(&state->accelerator);
    initialise_signal(&state->boost_pressure);
    initialise_signal(&state->ambient_pressure);
}

static void initialise_measured(skarn_smallest_measured_t *measured)
{
    measured->engine_speed_rpm = 0.0f;
    measured->accelerator_ratio = 0.0f;
    measured->boost_pressure_kpa = 0.0f;
    measured->ambient_pressure_kpa = 0.0f;
}

static void initialise_slow(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state)
{
    initialise_slow_signals(state);
    initialise_measured(&state->measured);
    state->mode = SKARN_SMALLEST_MODE_START;
    state->target_kpa = 0.0f;
    state->boost_wanted = false;
    state->integral_term = 0.0f;
    state->opening_ratio = calibration->safe_opening_ratio;
}

/* Debounce: suspect for `after_steps` makes the signal failed, good for `heals_after_steps` makes it
 * usable again; zero means at once. While suspect the last good sample is kept. Counters stop at their
 * limits, so they never wrap.
 */
static void debounce(const skarn_smallest_signal_calibration_t *calibration,
    skarn_smallest_signal_state_t *state, float raw, bool suspect)
{
    if (suspect) {
        state->good_steps = 0;
        if (state->suspect_steps >= calibration->after_steps) {
            state->failed = true;
        } else {
            state->suspect_steps = state->suspect_steps + 1;
        }
    } else {
        state->suspect_steps = 0;
        state->last_good = raw;
        state->has_good = true;
        if (state->failed) {
            if (state->good_steps >= calibration->heals_after_steps) {
                state->failed = false;
            } else {
                state->good_steps = state->good_steps + 1;
            }
        }
    }
}

/* Not a number, infinite, or outside the believable range. */
static bool outside_range(const skarn_smallest_signal_calibration_t *calibration, float raw)
{
    return !((raw >= calibration->low) && (raw <= calibration->high));
}

/* There has been a good sample and the signal has not failed. */
static bool usable(const skarn_smallest_signal_state_t *state)
{
    return state->has_good && !state->failed;
}

/* Engine speed, rpm; the substitute while it is not usable. */
static float condition_engine_speed(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state, float raw)
{
    const bool suspect = outside_range(&calibration->engine_speed, raw);
    debounce(&calibration->engine_speed, &state->engine_speed, raw, suspect);
    float value = calibration->engine_speed_otherwise_rpm;
    if (usable(&state->engine_speed)) {
        value = state->engine_speed.last_good;
    }
    return value;
}

/* Accelerator, 0..1; the substitute while it is not usable. */
static float condition_accelerator(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state, float raw)
{
    const bool suspect = outside_range(&calibration->accelerator, raw);
    debounce(&calibration->accelerator, &state->accelerator, raw, suspect);
    float value = calibration->accelerator_otherwise_ratio;
    if (usable(&state->accelerator)) {
        value = state->accelerator.last_good;
    }
    return value;
}

/* Boost pressure, kPa; the last good sample while it is doubted (the mode decides what happens once it has
 * failed).
 * A frozen sensor is recognised by the target having moved meanwhile.
 */
static float condition_boost_pressure(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state, float raw)
{
    const bool suspect = outside_range(&calibration->boost_pressure, raw);
    debounce(&calibration->boost_pressure, &state->boost_pressure, raw, suspect);
    float value = calibration->boost_pressure.low;
    if (state->boost_pressure.has_good) {
        value = state->boost_pressure.last_good;
    }
    return value;
}

/* Ambient pressure, kPa; the substitute while it is not usable. */
static float condition_ambient_pressure(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state, float raw)
{
    const bool suspect = outside_range(&calibration->ambient_pressure, raw);
    debounce(&calibration->ambient_pressure, &state->ambient_pressure, raw, suspect);
    float value = calibration->ambient_pressure_otherwise_kpa;
    if (usable(&state->ambient_pressure)) {
        value = state->ambient_pressure.last_good;
    }
    return value;
}

/* Conditions every signal of the slow step into `state.measured`. */
static void condition_slow_signals(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state, const skarn_smallest_slow_input_t *input)
{
    state->measured.engine_speed_rpm = condition_engine_speed(calibration, state, input->engine_speed_rpm);
    state->measured.accelerator_ratio = condition_accelerator(calibration, state, input->accelerator_ratio);
    state->measured.boost_pressure_kpa =
        condition_boost_pressure(calibration, state, input->boost_pressure_kpa);
    const float ambient = condition_ambient_pressure(calibration, state, input->ambient_pressure_kpa);
    state->measured.ambient_pressure_kpa = ambient;
}

static float integral_gain_at(const skarn_smallest_calibration_t *calibration)
{
    return calibration->integral_gain;
}

/* Next integral term, kept within the trim limits.
 *   conditional        I += Ki e dt, when allowed
 *   back calculation   I += (Ki e + (applied - unlimited) / Tt) dt
 *   none               I += Ki e dt
 * source: Astrom & Hagglund, Advanced PID Control, 2006, back-calculation (from memory)
 */
static float next_integral(const skarn_smallest_calibration_t *calibration, float integral,
    float integral_rate, float unlimited, float applied)
{
    float rate = integral_rate;
    rate = rate + ((applied - unlimited) / calibration->tracking_time_s);
    return clamp(integral + (rate * STEP_S), calibration->trim_low, calibration->trim_high);
}

/* Moves the integral term for the next step. `unlimited` is the sum of terms, `loop_opening_ratio` the
 * opening for it, `guard_floor` and `guard_active` as last read from the fast step.
 */
static void update_integral(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state, float unlimited, float guard_floor)
{
    const float error = state->measured.boost_pressure_kpa - state->target_kpa;
    const float integral_rate = integral_gain_at(calibration) * error;
    const float applied = max_of(state->opening_ratio, guard_floor);
    state->integral_term =
        next_integral(calibration, state->integral_term, integral_rate, unlimited, applied);
}

/* Lets the integral fade, so that the loop returns without a bump. */
static void fade_integral(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state)
{
    const float kept = state->integral_term - (state->integral_term * 0x1.86186p-5f /* 0.047619045 */);
    state->integral_term = clamp(kept, calibration->trim_low, calibration->trim_high);
}

/* Sets the outputs that a calibration engineer plots beside the terms. */
static void report(const skarn_smallest_slow_state_t *state, skarn_smallest_slow_output_t *output)
{
    output->boost_target_kpa = state->target_kpa;
    output->mode = state->mode;
    output->wanted_opening_ratio = state->opening_ratio;
    output->engine_speed_failed = state->engine_speed.failed;
    output->accelerator_failed = state->accelerator.failed;
    output->boost_pressure_failed = state->boost_pressure.failed;
    output->ambient_pressure_failed = state->ambient_pressure.failed;
}

/* Hands over to the fast step. The flag goes before its value when things worsen and after it when they
 * heal, so the fast step may interrupt anywhere: every prefix of these lines is safe.
 */
static void commit(const skarn_smallest_slow_state_t *state, skarn_smallest_exchange_t *exchange,
    bool failed)
{
    if (failed) {
        exchange->fail_safe = true;
        exchange->wanted_opening_ratio = state->opening_ratio;
    } else {
        exchange->wanted_opening_ratio = state->opening_ratio;
        exchange->fail_safe = false;
    }
}

/* Interval of the axis that holds `x`: the last node not above it, within 0 .. length - 2. NaN gives 0. */
static int32_t locate(const float axis[], int32_t axis_count, float x)
{
    int32_t index = 0;
    for (int32_t i = 1; i < (axis_count - 1); i++) {
        if (x >= axis[i]) {
            index = i;
        }
    }
    return index;
}

/* How far `x` lies between two nodes, 0 .. 1; outside the axis the nearer end. NaN gives 0.
 * fraction = (x - low) / (high - low), with high > low an obligation on the calibration.
 */
static float fraction_between(float low, float high, float x)
{
    return clamp((x - low) / (high - low), 0.0f, 1.0f);
}

/* Straight line between two values, never outside them: a + (b - a) t can pass b by one rounding, hence
 * the clamp.
 */
static float blend(float a, float b, float fraction)
{
    return clamp(a + ((b - a) * fraction), min_of(a, b), max_of(a, b));
}

/* Bilinear value over two axes, held constant outside them: along the columns first, then between the two
 * rows.
 */
static float interpolate_table(const float rows[], int32_t rows_count, const float columns[],
    int32_t columns_count, const float values[], float row, float column)
{
    const int32_t r = locate(rows, rows_count, row);
    const int32_t c = locate(columns, columns_count, column);
    const float column_fraction = fraction_between(columns[c], columns[c + 1], column);
    const int32_t first = (r * columns_count) + c;
    const int32_t second = first + columns_count;
    const float low = blend(values[first], values[first + 1], column_fraction);
    const float high = blend(values[second], values[second + 1], column_fraction);
    return blend(low, high, fraction_between(rows[r], rows[r + 1], row));
}

/* Pressure the driver asks for, kPa abs: table over accelerator and engine speed, in the table's own
 * reference.
 */
static float requested_boost(const skarn_smallest_calibration_t *calibration,
    const skarn_smallest_measured_t *measured)
{
    return interpolate_table(calibration->target_boost_rows, 3, calibration->target_boost_columns, 3,
        calibration->target_boost_values, measured->accelerator_ratio, measured->engine_speed_rpm);
}

/* The lowest of the ceilings, kPa abs. */
static float boost_ceiling(const skarn_smallest_calibration_t *calibration)
{
    return calibration->boost_ceiling_kpa;
}

/* Follows `wanted` no faster than `rise_per_s` upwards and `fall_per_s` downwards, and reaches it exactly.
 * A step may differ from rate * dt by one rounding of the sum. NaN in `wanted` falls.
 */
static float rate_limit(float previous, float wanted, float rise_per_s, float fall_per_s, float step_s)
{
    return clamp(wanted, previous - (fall_per_s * step_s), previous + (rise_per_s * step_s));
}

/* The target that the loop follows, kPa abs: wanted less the guard's reduction, but no lower than ambient
 * by it, slewed.
 * `restart`: begin at the boost there is, after power-on, after fail-safe and while a trip holds the gate
 * open.
 */
static float follow_target(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state, float wanted_kpa, float reduction_kpa, bool restart)
{
    float previous = state->target_kpa;
    if (restart) {
        previous = state->measured.boost_pressure_kpa;
    }
    const float reduced =
        max_of(wanted_kpa - reduction_kpa, min_of(wanted_kpa, state->measured.ambient_pressure_kpa));
    state->target_kpa = rate_limit(previous, reduced, calibration->target_rise_kpa_per_s,
        calibration->target_fall_kpa_per_s, STEP_S);
    return state->target_kpa;
}

/* Whether the target asks for boost: ambient plus the least boost to begin, a little lower to end. */
static bool wants_boost(const skarn_smallest_calibration_t *calibration, skarn_smallest_slow_state_t *state)
{
    float threshold = state->measured.ambient_pressure_kpa + calibration->least_boost_kpa;
    if (state->boost_wanted) {
        threshold = threshold - min_of(LEAST_BOOST_HYSTERESIS_KPA, calibration->least_boost_kpa);
    }
    state->boost_wanted = state->target_kpa >= threshold;
    return state->boost_wanted;
}

static float proportional_gain_at(const skarn_smallest_calibration_t *calibration)
{
    return calibration->proportional_gain;
}

/* Error with set-point weight b on gauge pressures, kPa; the proportional term is the gain times it.
 *   P = K ((p - pamb) - b (r - pamb)); more opening lowers the boost, so the error is measured minus
 *   target.
 * source: Astrom & Hagglund, Advanced PID Control, 2006, two-degree-of-freedom PID (from memory)
 */
static float weighted_error(const skarn_smallest_calibration_t *calibration,
    const skarn_smallest_measured_t *measured, float target_kpa)
{
    const float gauge = measured->boost_pressure_kpa - measured->ambient_pressure_kpa;
    return gauge - (calibration->setpoint_weight_ratio * (target_kpa - measured->ambient_pressure_kpa));
}

/* Feedforward, P, I and D for a target, each written to the output; returns their sum in the feedback
 * coordinate.
 */
static float sum_of_terms(const skarn_smallest_calibration_t *calibration,
    const skarn_smallest_slow_state_t *state, float target_kpa, skarn_smallest_slow_output_t *output)
{
    const float gain = proportional_gain_at(calibration);
    const float weighted = weighted_error(calibration, &state->measured, target_kpa);
    const float feedforward = 0.0f;
    const float proportional = gain * weighted;
    output->feedforward_term = feedforward;
    output->proportional_term = proportional;
    float sum = feedforward + proportional;
    output->integral_term = state->integral_term;
    sum = sum + state->integral_term;
    return sum;
}

/* Opening within the actuator's range. Not a number opens: the safe side of a wastegate is open. */
static float limit_opening(const skarn_smallest_calibration_t *calibration, float opening_ratio)
{
    float limited = calibration->opening_high_ratio;
    if (opening_ratio < calibration->opening_low_ratio) {
        limited = calibration->opening_low_ratio;
    } else if (opening_ratio <= calibration->opening_high_ratio) {
        limited = opening_ratio;
    } else {
        /* nothing to do */
    }
    return limited;
}

/* Opening that gives a value of the feedback coordinate: itself, or the gate's area curve read backwards. */
static float opening_for(const skarn_smallest_calibration_t *calibration, float coordinate)
{
    return limit_opening(calibration, coordinate);
}

/* The only place where the mode changes. The first line that applies wins:
 *   fail_safe    a signal that the loop cannot do without has failed
 *   start        such a signal has not given a good sample yet
 *   guard        the overspeed guard holds the gate further open than the loop wants
 *   no_boost     the wanted pressure is about ambient
 *   closed_loop  otherwise
 */
static skarn_smallest_mode_t choose_mode(bool failed, bool ready, bool boost_wanted)
{
    skarn_smallest_mode_t mode = SKARN_SMALLEST_MODE_CLOSED_LOOP;
    if (failed) {
        mode = SKARN_SMALLEST_MODE_FAIL_SAFE;
    } else if (!ready) {
        mode = SKARN_SMALLEST_MODE_START;
    } else if (!boost_wanted) {
        mode = SKARN_SMALLEST_MODE_NO_BOOST;
    } else {
        /* nothing to do */
    }
    return mode;
}

/* Opening the slow step commands: safe, at rest, or the loop's, the last two within the actuator's slew.
 * While a trip holds the gate open it stays there, so that the release closes the gate within the slew as
 * well.
 */
static float commanded_opening(const skarn_smallest_calibration_t *calibration,
    const skarn_smallest_slow_state_t *state, skarn_smallest_mode_t mode, bool boost_wanted,
    float loop_opening_ratio)
{
    float wanted = loop_opening_ratio;
    if (!boost_wanted) {
        wanted = calibration->rest_opening_ratio;
    }
    float opening = rate_limit(state->opening_ratio, wanted, calibration->slew_open_ratio_per_s,
        calibration->slew_close_ratio_per_s, STEP_S);
    if ((mode == SKARN_SMALLEST_MODE_START) || (mode == SKARN_SMALLEST_MODE_FAIL_SAFE)) {
        opening = calibration->safe_opening_ratio;
    }
    return opening;
}

/* ---- 4 init and steps ---------------------------------------------------------------------------- */

/* Sets both states and the exchange as after power-on: gate at its safe opening, nothing tripped, no
 * signal known.
 */
void skarn_smallest_init(const skarn_smallest_calibration_t *calibration, skarn_smallest_slow_state_t *slow,
    skarn_smallest_exchange_t *exchange)
{
    initialise_slow(calibration, slow);
    exchange->wanted_opening_ratio = calibration->safe_opening_ratio;
    exchange->fail_safe = false;
}

/* The slow step: the boost loop. Condition, target, feedforward and feedback, mode, arbitration,
 * anti-windup, commit.
 */
void skarn_smallest_step_boost(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state, skarn_smallest_exchange_t *exchange,
    const skarn_smallest_slow_input_t *input, skarn_smallest_slow_output_t *output)
{
    const float guard_floor = 0.0f;
    const float reduction = 0.0f;
    condition_slow_signals(calibration, state, input);
    const float requested = requested_boost(calibration, &state->measured);
    const float wanted = min_of(requested, boost_ceiling(calibration));
    output->boost_wanted_kpa = wanted;
    const bool restart =
        (state->mode == SKARN_SMALLEST_MODE_START) || (state->mode == SKARN_SMALLEST_MODE_FAIL_SAFE);
    const float target = follow_target(calibration, state, wanted, reduction, restart);
    const bool boost_wanted = wants_boost(calibration, state);
    const float unlimited = sum_of_terms(calibration, state, target, output);
    const float loop_opening = opening_for(calibration, unlimited);
    const bool failed = state->boost_pressure.failed;
    const bool ready = state->boost_pressure.has_good;
    state->mode = choose_mode(failed, ready, boost_wanted);
    state->opening_ratio = commanded_opening(calibration, state, state->mode, boost_wanted, loop_opening);
    if (boost_wanted && ready && !failed) {
        update_integral(calibration, state, unlimited, guard_floor);
    } else {
        fade_integral(calibration, state);
    }
    report(state, output);
    commit(state, exchange, failed);
}

/* The fast step: watches the turbo's speed and has the last word on gate and torque. Call it every guard
 * step, before the slow step when both fall together; it may interrupt the slow step anywhere.
 */
void skarn_smallest_step_guard(const skarn_smallest_calibration_t *calibration,
    const skarn_smallest_exchange_t *exchange, skarn_smallest_fast_output_t *output)
{
    const float wanted_opening = exchange->wanted_opening_ratio;
    const bool fail_safe = exchange->fail_safe;
    float command = wanted_opening;
    float torque_limit = 1.0f;
    if (fail_safe) {
        command = calibration->safe_opening_ratio;
        torque_limit = calibration->fail_safe_torque_ratio;
    }
    command = limit_opening(calibration, command);
    output->wastegate_command_ratio = command;
    output->torque_limit_ratio = torque_limit;
    output->fail_safe = fail_safe;
}

/* Looks at every calibration value: finite, within its range, axes and pairs in order. */
int32_t skarn_smallest_check_calibration(const skarn_smallest_calibration_t *calibration)
{
    int32_t bad = -1;
    bad = bad_real(calibration->engine_speed.low, 0.0f, 1000000.0f, 0, bad);
    bad = bad_real(calibration->engine_speed.high, 0.0f, 1000000.0f, 1, bad);
    bad = bad_rise(calibration->engine_speed.low, calibration->engine_speed.high, 1, bad);
    bad = bad_count(calibration->engine_speed.after_steps, 0, 1000000, 2, bad);
    bad = bad_count(calibration->engine_speed.heals_after_steps, 0, 1000000, 3, bad);
    bad = bad_real(calibration->engine_speed_otherwise_rpm, 0.0f, 1000000.0f, 4, bad);
    bad = bad_real(calibration->accelerator.low, 0.0f, 1.0f, 5, bad);
    bad = bad_real(calibration->accelerator.high, 0.0f, 1.0f, 6, bad);
    bad = bad_rise(calibration->accelerator.low, calibration->accelerator.high, 6, bad);
    bad = bad_count(calibration->accelerator.after_steps, 0, 1000000, 7, bad);
    bad = bad_count(calibration->accelerator.heals_after_steps, 0, 1000000, 8, bad);
    bad = bad_real(calibration->accelerator_otherwise_ratio, 0.0f, 1.0f, 9, bad);
    bad = bad_real(calibration->boost_pressure.low, 1.0f, 2000.0f, 10, bad);
    bad = bad_real(calibration->boost_pressure.high, 1.0f, 2000.0f, 11, bad);
    bad = bad_rise(calibration->boost_pressure.low, calibration->boost_pressure.high, 11, bad);
    bad = bad_count(calibration->boost_pressure.after_steps, 0, 1000000, 12, bad);
    bad = bad_count(calibration->boost_pressure.heals_after_steps, 0, 1000000, 13, bad);
    bad = bad_real(calibration->ambient_pressure.low, 1.0f, 2000.0f, 14, bad);
    bad = bad_real(calibration->ambient_pressure.high, 1.0f, 2000.0f, 15, bad);
    bad = bad_rise(calibration->ambient_pressure.low, calibration->ambient_pressure.high, 15, bad);
    bad = bad_count(calibration->ambient_pressure.after_steps, 0, 1000000, 16, bad);
    bad = bad_count(calibration->ambient_pressure.heals_after_steps, 0, 1000000, 17, bad);
    bad = bad_real(calibration->ambient_pressure_otherwise_kpa, 1.0f, 2000.0f, 18, bad);
    bad = bad_array(calibration->target_boost_rows, 3, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 19, bad);
    bad = bad_axis(calibration->target_boost_rows, 3, 19, bad);
    bad = bad_array(calibration->target_boost_columns, 3, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 22, bad);
    bad = bad_axis(calibration->target_boost_columns, 3, 22, bad);
    bad = bad_array(calibration->target_boost_values, 9, 0.0f, 2000.0f, 25, bad);
    bad = bad_real(calibration->boost_ceiling_kpa, 1.0f, 2000.0f, 34, bad);
    bad = bad_real(calibration->least_boost_kpa, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 35, bad);
    bad = bad_real(calibration->target_rise_kpa_per_s, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 36, bad);
    bad = bad_real(calibration->target_fall_kpa_per_s, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 37, bad);
    bad = bad_real(calibration->proportional_gain, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 38, bad);
    bad = bad_real(calibration->integral_gain, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 39, bad);
    bad = bad_real(calibration->setpoint_weight_ratio, 0.0f, 2.0f, 40, bad);
    bad = bad_real(calibration->trim_low, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 41, bad);
    bad = bad_real(calibration->trim_high, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 42, bad);
    bad = bad_rise(calibration->trim_low, calibration->trim_high, 42, bad);
    bad = bad_real(calibration->tracking_time_s, 0x1.0c6f7ap-20f /* 0.000001 */, 1000.0f, 43, bad);
    bad = bad_real(calibration->opening_low_ratio, 0.0f, 1.0f, 44, bad);
    bad = bad_real(calibration->opening_high_ratio, 0.0f, 1.0f, 45, bad);
    bad = bad_rise(calibration->opening_low_ratio, calibration->opening_high_ratio, 45, bad);
    bad = bad_real(calibration->slew_open_ratio_per_s, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 46, bad);
    bad = bad_real(calibration->slew_close_ratio_per_s, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 47, bad);
    bad = bad_real(calibration->safe_opening_ratio, 0.0f, 1.0f, 48, bad);
    bad = bad_order(calibration->opening_low_ratio, calibration->safe_opening_ratio, 48, bad);
    bad = bad_order(calibration->safe_opening_ratio, calibration->opening_high_ratio, 48, bad);
    bad = bad_real(calibration->rest_opening_ratio, 0.0f, 1.0f, 49, bad);
    bad = bad_order(calibration->opening_low_ratio, calibration->rest_opening_ratio, 49, bad);
    bad = bad_order(calibration->rest_opening_ratio, calibration->opening_high_ratio, 49, bad);
    bad = bad_real(calibration->fail_safe_torque_ratio, 0.0f, 1.0f, 50, bad);
    return bad;
}
