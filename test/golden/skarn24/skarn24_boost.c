/* skarn24_boost.c - the controller; every + - * / below rounds once, at float32
 * Boost loop of the Skarn Hill 2.4 l hill-climb prototype (invented)
 * Generated from skarn24.yaml, meaning HASH. Edit that file instead of this one.
 * Contents: 1 assumptions  2 helpers and constants  3 blocks in run order  4 init and steps
 */
#include "skarn24_boost.h"

#include <float.h>
#include <math.h>

/* ---- 1 assumptions ------------------------------------------------------------------------------- */
#if (SKARN24_BOOST_STEP_BOOST_PERIOD_US != 5000)
#error "skarn24_boost.h was not generated together with this file: SKARN24_BOOST_STEP_BOOST_PERIOD_US must be 5000"
#endif
#if (SKARN24_BOOST_STEP_GUARD_PERIOD_US != 1000)
#error "skarn24_boost.h was not generated together with this file: SKARN24_BOOST_STEP_GUARD_PERIOD_US must be 1000"
#endif
#if defined(__FAST_MATH__)
#error "build skarn24_boost without -ffast-math and with -ffp-contract=off"
#endif
#if defined(__FINITE_MATH_ONLY__)
#if (__FINITE_MATH_ONLY__ != 0)
#error "build skarn24_boost without -ffinite-math-only"
#endif
#endif
#if !defined(FLT_EVAL_METHOD)
#error "skarn24_boost needs a compiler that states FLT_EVAL_METHOD (C99)"
#elif (FLT_EVAL_METHOD != 0)
#error "skarn24_boost must be evaluated without extra precision"
#endif
#if defined(FLT_RADIX)
#if (FLT_RADIX != 2)
#error "skarn24_boost needs IEEE 754 arithmetic: FLT_RADIX must be 2"
#endif
#endif
#if defined(FLT_MANT_DIG)
#if (FLT_MANT_DIG != 24)
#error "skarn24_boost needs IEEE 754 arithmetic: FLT_MANT_DIG must be 24"
#endif
#endif
#if defined(FLT_MAX_EXP)
#if (FLT_MAX_EXP != 128)
#error "skarn24_boost needs IEEE 754 arithmetic: FLT_MAX_EXP must be 128"
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
#define ACCELERATION_STEPS (50) /* 50 fast steps */
#define LONGEST_GAP_STEPS (1000000) /* 1000000; Steps without a sample are counted up to here. */
#define STEP_S (0x1.47ae14p-8f) /* 0.005 s */
#define LEAST_GAUGE_KPA (25.0f) /* 25; Smallest gauge target that the gain schedule divides by, kPa. */
#define LEAST_BOOST_HYSTERESIS_KPA (2.0f) /* 2; Fall below the least boost that ends it, kPa. */
#define GUARD_STEP_S (0x1.0624dep-10f) /* 0.001 s */

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

static void initialise_signal(skarn24_boost_signal_state_t *state)
{
    state->last_good = 0.0f;
    state->has_good = false;
    state->suspect = false;
    state->failed = false;
    state->suspect_steps = 0;
    state->good_steps = 0;
}

static void initialise_rate_check(skarn24_boost_rate_check_state_t *state)
{
    state->anchor = 0.0f;
    state->age = 0;
    state->primed = false;
}

static void initialise_low_pass(skarn24_boost_low_pass_state_t *state)
{
    state->value = 0.0f;
    state->primed = false;
}

static void initialise_slow_signals(skarn24_boost_slow_state_t *state)
{
    initialise_signal(&state->engine_speed);
    initialise_signal(&state->accelerator);
    initialise_signal(&state->boost_pressure);
    initialise_signal(&state->ambient_pressure);
    initialise_rate_check(&state->boost_pressure_rate);
    initialise_low_pass(&state->boost_pressure_filter);
}

static void initialise_optional_signals(skarn24_boost_slow_state_t *state)
{
    initialise_signal(&state->charge_temperature);
}

static void initialise_measured(skarn24_boost_measured_t *measured)
{
    measured->engine_speed_rpm = 0.0f;
    measured->accelerator_ratio = 0.0f;
    measured->boost_pressure_kpa = 0.0f;
    measured->ambient_pressure_kpa = 0.0f;
    measured->lowest_ambient_kpa = 0.0f;
    measured->charge_temperature_k = 0.0f;
}

static void initialise_slow(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state)
{
    initialise_slow_signals(state);
    initialise_optional_signals(state);
    initialise_measured(&state->measured);
    state->mode = SKARN24_BOOST_MODE_START;
    state->target_kpa = 0.0f;
    state->boost_wanted = false;
    state->integral_term = 0.0f;
    state->previous_pressure_kpa = 0.0f;
    state->pressure_rate_kpa_per_s = 0.0f;
    state->opening_ratio = calibration->safe_opening_ratio;
}

static void initialise_stuck_check(skarn24_boost_stuck_check_state_t *state)
{
    state->last_raw = 0.0f;
    state->companion_anchor = 0.0f;
    state->same_steps = 0;
}

static void initialise_floor(skarn24_boost_fast_state_t *state)
{
    initialise_low_pass(&state->turbo_speed_filter);
    for (int32_t i = 0; i < ACCELERATION_STEPS; i++) {
        state->speed_history_rpm[i] = 0.0f;
    }
    state->speed_history_next = 0;
    state->speed_history_filled = false;
    state->guard_integral_term = 0.0f;
    state->target_reduction_kpa = 0.0f;
}

static void initialise_trip(skarn24_boost_fast_state_t *state)
{
    state->tripped = false;
    state->above_ceiling_steps = 0;
    state->below_release_steps = 0;
    state->tripped_steps = 0;
}

static void initialise_fast(skarn24_boost_fast_state_t *state)
{
    initialise_signal(&state->turbo_speed);
    state->suspect_gain_rpm = 0.0f;
    initialise_rate_check(&state->turbo_speed_rate);
    initialise_stuck_check(&state->turbo_speed_stuck);
    initialise_floor(state);
    initialise_trip(state);
}

/* Debounce: suspect for `after_steps` makes the signal failed, good for `heals_after_steps` makes it
 * usable again; zero means at once. While suspect the last good sample is kept. Counters stop at their
 * limits, so they never wrap.
 */
static void debounce(const skarn24_boost_signal_calibration_t *calibration,
    skarn24_boost_signal_state_t *state, float raw, bool suspect)
{
    state->suspect = suspect;
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
static bool outside_range(const skarn24_boost_signal_calibration_t *calibration, float raw)
{
    return !((raw >= calibration->low) && (raw <= calibration->high));
}

/* There has been a good sample and the signal has not failed. */
static bool usable(const skarn24_boost_signal_state_t *state)
{
    return state->has_good && !state->failed;
}

/* Engine speed, rpm; the substitute while it is not usable. */
static float condition_engine_speed(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state, float raw)
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
static float condition_accelerator(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state, float raw)
{
    const bool suspect = outside_range(&calibration->accelerator, raw);
    debounce(&calibration->accelerator, &state->accelerator, raw, suspect);
    float value = calibration->accelerator_otherwise_ratio;
    if (usable(&state->accelerator)) {
        value = state->accelerator.last_good;
    }
    return value;
}

/* Largest believable change since the anchor: one window's worth, or more when samples were missing for
 * longer.
 */
static float believable_change(const skarn24_boost_rate_check_calibration_t *calibration,
    const skarn24_boost_rate_check_state_t *state)
{
    return calibration->most_change * max_of((float)state->age / (float)calibration->window_steps, 1.0f);
}

/* Changed faster than believable since an accepted sample about one window ago, so that one quantum of a
 * coarse sensor in one step is no alarm. A jump stays doubted, and its level is not accepted, until the
 * signal has failed; from then on the believable change grows with time, so that a sensor that came back
 * elsewhere can heal.
 * `outside`: this step has no believable sample; it only counts as time gone by.
 */
static bool moved_too_fast(const skarn24_boost_rate_check_calibration_t *calibration,
    skarn24_boost_rate_check_state_t *state, float raw, bool outside, bool failed)
{
    bool too_fast = false;
    if (!outside) {
        too_fast = state->primed && (fabsf(raw - state->anchor) > believable_change(calibration, state));
        if (!too_fast && (!state->primed || (state->age >= calibration->window_steps))) {
            state->anchor = raw;
            state->age = 0;
            state->primed = true;
        }
    }
    if ((!too_fast || failed) && (state->age < LONGEST_GAP_STEPS)) {
        state->age = state->age + 1;
    }
    return too_fast;
}

/* First-order low-pass filter by the backward Euler rule; starts at its first sample.
 *   y[k] = y[k-1] + (x[k] - y[k-1]) dt / (tau + dt)
 * The result stays between y[k-1] and x[k]; the clamp removes the one rounding that could leave that hull.
 */
static float low_pass(skarn24_boost_low_pass_state_t *state, float x, float time_constant_s, float step_s)
{
    if (!state->primed) {
        state->value = x;
        state->primed = true;
    }
    const float y = state->value;
    const float moved = y + ((x - y) * (step_s / (time_constant_s + step_s)));
    state->value = clamp(moved, min_of(x, y), max_of(x, y));
    return state->value;
}

/* Boost pressure, kPa; the last good sample while it is doubted (the mode decides what happens once it has
 * failed).
 * A frozen sensor is recognised by the target having moved meanwhile.
 */
static float condition_boost_pressure(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state, float raw)
{
    bool suspect = outside_range(&calibration->boost_pressure, raw);
    const bool too_fast = moved_too_fast(&calibration->boost_pressure_rate, &state->boost_pressure_rate,
        raw, suspect, state->boost_pressure.failed);
    suspect = suspect || too_fast;
    debounce(&calibration->boost_pressure, &state->boost_pressure, raw, suspect);
    float value = calibration->boost_pressure.low;
    if (state->boost_pressure.has_good) {
        value = state->boost_pressure.last_good;
        value =
            low_pass(&state->boost_pressure_filter, value, calibration->boost_pressure_filter_s, STEP_S);
    }
    return value;
}

/* Ambient pressure, kPa; the substitute while it is not usable. */
static float condition_ambient_pressure(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state, float raw)
{
    const bool suspect = outside_range(&calibration->ambient_pressure, raw);
    debounce(&calibration->ambient_pressure, &state->ambient_pressure, raw, suspect);
    float value = calibration->ambient_pressure_otherwise_kpa;
    if (usable(&state->ambient_pressure)) {
        value = state->ambient_pressure.last_good;
    }
    return value;
}

/* Charge temperature, K; the reference temperature, that is no compensation, while it is not usable. */
static float condition_charge_temperature(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state, float raw)
{
    const bool suspect = outside_range(&calibration->charge_temperature, raw);
    debounce(&calibration->charge_temperature, &state->charge_temperature, raw, suspect);
    float value = calibration->air_reference_temperature_k;
    if (usable(&state->charge_temperature)) {
        value = state->charge_temperature.last_good;
    }
    return value;
}

/* Conditions every signal of the slow step into `state.measured`. */
static void condition_slow_signals(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state, const skarn24_boost_slow_input_t *input)
{
    state->measured.engine_speed_rpm = condition_engine_speed(calibration, state, input->engine_speed_rpm);
    state->measured.accelerator_ratio = condition_accelerator(calibration, state, input->accelerator_ratio);
    state->measured.boost_pressure_kpa =
        condition_boost_pressure(calibration, state, input->boost_pressure_kpa);
    const float ambient = condition_ambient_pressure(calibration, state, input->ambient_pressure_kpa);
    state->measured.ambient_pressure_kpa = ambient;
    state->measured.lowest_ambient_kpa = ambient;
    if (state->ambient_pressure.failed) {
        state->measured.lowest_ambient_kpa = calibration->ambient_pressure.low;
    }
    const float charge = condition_charge_temperature(calibration, state, input->charge_temperature_k);
    state->measured.charge_temperature_k = charge;
}

/* Gauge target for the gain schedule, kPa, never below 25: the plant's slope is proportional to gauge
 * pressure, so dividing by it makes the loop gain nearly constant.
 */
static float scheduled_gauge(float target_kpa, float ambient_kpa)
{
    return max_of(target_kpa - ambient_kpa, LEAST_GAUGE_KPA);
}

/* A pressure or its rate as the gains see it: over the gauge target, or as it is. */
static float normalise(float value, float gauge_kpa)
{
    return value / gauge_kpa;
}

static float integral_gain_at(const skarn24_boost_calibration_t *calibration)
{
    return calibration->integral_gain;
}

/* Conditional integration: integrate only while the output is not saturated in the error's direction, the
 * guard does not hold the gate, and the error is inside the band or the pressure nearly stands still.
 * source: Astrom & Hagglund, Advanced PID Control, 2006, conditional integration (from memory)
 */
static bool may_integrate(const skarn24_boost_calibration_t *calibration, float error, float rate,
    bool saturated_closed, bool saturated_open, bool guard_active)
{
    const bool drives_further = (saturated_open && (error > 0.0f)) || (saturated_closed && (error < 0.0f));
    const bool near =
        (fabsf(error) < calibration->windup_band) || (fabsf(rate) < calibration->windup_still_below);
    return !drives_further && !guard_active && near;
}

/* Whether conditional integration lets the integral move in this step. */
static bool integration_allowed(const skarn24_boost_calibration_t *calibration,
    const skarn24_boost_slow_state_t *state, float error, float gauge_kpa, float loop_opening_ratio,
    bool guard_active)
{
    const bool closed = loop_opening_ratio <= calibration->opening_low_ratio;
    const bool open = loop_opening_ratio >= calibration->opening_high_ratio;
    const float rate = normalise(state->pressure_rate_kpa_per_s, gauge_kpa);
    return may_integrate(calibration, error, rate, closed, open, guard_active);
}

/* Next integral term, kept within the trim limits.
 *   conditional        I += Ki e dt, when allowed
 *   back calculation   I += (Ki e + (applied - unlimited) / Tt) dt
 *   none               I += Ki e dt
 * source: Astrom & Hagglund, Advanced PID Control, 2006, back-calculation (from memory)
 */
static float next_integral(const skarn24_boost_calibration_t *calibration, float integral,
    float integral_rate, bool allowed)
{
    float rate = integral_rate;
    if (!allowed) {
        rate = 0.0f;
    }
    return clamp(integral + (rate * STEP_S), calibration->trim_low, calibration->trim_high);
}

/* Moves the integral term for the next step. `unlimited` is the sum of terms, `loop_opening_ratio` the
 * opening for it, `guard_floor` and `guard_active` as last read from the fast step.
 */
static void update_integral(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state, float loop_opening_ratio, bool guard_active)
{
    const float gauge = scheduled_gauge(state->target_kpa, state->measured.ambient_pressure_kpa);
    const float error = normalise(state->measured.boost_pressure_kpa - state->target_kpa, gauge);
    const float integral_rate = integral_gain_at(calibration) * error;
    const bool allowed =
        integration_allowed(calibration, state, error, gauge, loop_opening_ratio, guard_active);
    state->integral_term = next_integral(calibration, state->integral_term, integral_rate, allowed);
}

/* Lets the integral fade, so that the loop returns without a bump. */
static void fade_integral(const skarn24_boost_calibration_t *calibration, skarn24_boost_slow_state_t *state)
{
    const float kept = state->integral_term - (state->integral_term * 0x1.8f9c18p-6f /* 0.024390243 */);
    state->integral_term = clamp(kept, calibration->trim_low, calibration->trim_high);
}

/* Sets the outputs that a calibration engineer plots beside the terms. */
static void report(const skarn24_boost_slow_state_t *state, skarn24_boost_slow_output_t *output)
{
    output->boost_target_kpa = state->target_kpa;
    output->mode = state->mode;
    output->wanted_opening_ratio = state->opening_ratio;
    output->engine_speed_failed = state->engine_speed.failed;
    output->accelerator_failed = state->accelerator.failed;
    output->boost_pressure_failed = state->boost_pressure.failed;
    output->ambient_pressure_failed = state->ambient_pressure.failed;
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

/* What holds the target in steady state, in the feedback coordinate: table over the target and engine
 * speed.
 */
static float feedforward_for(const skarn24_boost_calibration_t *calibration, float target_kpa,
    float ambient_kpa, float engine_speed_rpm)
{
    return interpolate_table(calibration->feedforward_rows, 6, calibration->feedforward_columns, 8,
        calibration->feedforward_values, target_kpa / ambient_kpa, engine_speed_rpm);
}

/* Engine speed for the foot of the guard's floor, rpm: the highest of the table while the sensor has
 * failed.
 */
static float guard_engine_speed(const skarn24_boost_calibration_t *calibration,
    const skarn24_boost_slow_state_t *state)
{
    float speed = state->measured.engine_speed_rpm;
    if (state->engine_speed.failed) {
        speed = calibration->feedforward_columns[7];
    }
    return speed;
}

/* Hands over to the fast step. The flag goes before its value when things worsen and after it when they
 * heal, so the fast step may interrupt anywhere: every prefix of these lines is safe.
 */
static void commit(const skarn24_boost_calibration_t *calibration, const skarn24_boost_slow_state_t *state,
    skarn24_boost_exchange_t *exchange, bool failed)
{
    const float ambient = state->measured.ambient_pressure_kpa;
    const float safe = calibration->guard_safe_pressure_ratio * ambient;
    exchange->guard_base =
        feedforward_for(calibration, safe, ambient, guard_engine_speed(calibration, state));
    float accelerator = 1.0f;
    if (usable(&state->accelerator)) {
        accelerator = state->measured.accelerator_ratio;
    }
    exchange->accelerator_ratio = accelerator;
    exchange->boost_pressure_kpa = state->measured.boost_pressure_kpa;
    if (failed) {
        exchange->fail_safe = true;
        exchange->wanted_opening_ratio = state->opening_ratio;
    } else {
        exchange->wanted_opening_ratio = state->opening_ratio;
        exchange->fail_safe = false;
    }
}

/* Factor on the wanted pressure that holds the air mass when the charge is hot, within 1 .. 1 + at most.
 *   factor = 1 + strength (Tcharge / Tref - 1), times pref / pamb for gauge and ratio targets only, since
 *   the air mass at a fixed absolute pressure does not depend on the weather's pressure. Ideal gas law.
 */
static float air_factor(const skarn24_boost_calibration_t *calibration, float charge_temperature_k)
{
    const float factor = 1.0f
        + (calibration->air_strength_ratio
            * ((charge_temperature_k / calibration->air_reference_temperature_k) - 1.0f));
    return clamp(factor, 1.0f, 1.0f + calibration->air_at_most_ratio);
}

/* Pressure the driver asks for, kPa abs: table over accelerator and engine speed, in the table's own
 * reference.
 */
static float requested_boost(const skarn24_boost_calibration_t *calibration,
    const skarn24_boost_measured_t *measured)
{
    const float from_table = interpolate_table(calibration->target_boost_rows, 6,
        calibration->target_boost_columns, 6, calibration->target_boost_values, measured->accelerator_ratio,
        measured->engine_speed_rpm);
    float absolute = from_table;
    absolute = absolute * air_factor(calibration, measured->charge_temperature_k);
    return absolute;
}

/* The lowest of the ceilings, kPa abs. */
static float boost_ceiling(const skarn24_boost_calibration_t *calibration,
    const skarn24_boost_measured_t *measured)
{
    float ceiling = calibration->boost_ceiling_kpa;
    ceiling = min_of(ceiling, calibration->pressure_ratio_ceiling * measured->lowest_ambient_kpa);
    return ceiling;
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
static float follow_target(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state, float wanted_kpa, float reduction_kpa, bool restart)
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
static bool wants_boost(const skarn24_boost_calibration_t *calibration, skarn24_boost_slow_state_t *state)
{
    float threshold = state->measured.ambient_pressure_kpa + calibration->least_boost_kpa;
    if (state->boost_wanted) {
        threshold = threshold - min_of(LEAST_BOOST_HYSTERESIS_KPA, calibration->least_boost_kpa);
    }
    state->boost_wanted = state->target_kpa >= threshold;
    return state->boost_wanted;
}

static float proportional_gain_at(const skarn24_boost_calibration_t *calibration)
{
    return calibration->proportional_gain;
}

/* Error with set-point weight b on gauge pressures, kPa; the proportional term is the gain times it.
 *   P = K ((p - pamb) - b (r - pamb)); more opening lowers the boost, so the error is measured minus
 *   target.
 * source: Astrom & Hagglund, Advanced PID Control, 2006, two-degree-of-freedom PID (from memory)
 */
static float weighted_error(const skarn24_boost_calibration_t *calibration,
    const skarn24_boost_measured_t *measured, float target_kpa)
{
    const float gauge = measured->boost_pressure_kpa - measured->ambient_pressure_kpa;
    return gauge - (calibration->setpoint_weight_ratio * (target_kpa - measured->ambient_pressure_kpa));
}

/* Filtered rate of the measured pressure, kPa/s, by the backward Euler rule.
 *   d[k] = (tau d[k-1] + p[k] - p[k-1]) / (tau + dt)
 * source: Astrom & Hagglund, Advanced PID Control, 2006, discretised derivative with filter (from memory)
 */
static float filtered_rate(float previous_rate, float previous_kpa, float pressure_kpa, float filter_s,
    float step_s)
{
    return ((filter_s * previous_rate) + (pressure_kpa - previous_kpa)) / (filter_s + step_s);
}

/* Rate of the measured pressure, kPa/s; zero in the first step. */
static float pressure_rate(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state)
{
    const float pressure = state->measured.boost_pressure_kpa;
    float previous = state->previous_pressure_kpa;
    if (state->mode == SKARN24_BOOST_MODE_START) {
        previous = pressure;
    }
    state->pressure_rate_kpa_per_s = filtered_rate(state->pressure_rate_kpa_per_s, previous, pressure,
        calibration->derivative_filter_s, STEP_S);
    state->previous_pressure_kpa = pressure;
    return state->pressure_rate_kpa_per_s;
}

static float derivative_gain_at(const skarn24_boost_calibration_t *calibration)
{
    return calibration->derivative_gain;
}

/* Feedforward, P, I and D for a target, each written to the output; returns their sum in the feedback
 * coordinate.
 */
static float sum_of_terms(const skarn24_boost_calibration_t *calibration, skarn24_boost_slow_state_t *state,
    float target_kpa, skarn24_boost_slow_output_t *output)
{
    const float ambient = state->measured.ambient_pressure_kpa;
    const float engine_speed = state->measured.engine_speed_rpm;
    const float gauge = scheduled_gauge(target_kpa, ambient);
    const float gain = proportional_gain_at(calibration);
    const float weighted = weighted_error(calibration, &state->measured, target_kpa);
    const float feedforward = feedforward_for(calibration, target_kpa, ambient, engine_speed);
    const float proportional = gain * normalise(weighted, gauge);
    output->feedforward_term = feedforward;
    output->proportional_term = proportional;
    float sum = feedforward + proportional;
    output->integral_term = state->integral_term;
    sum = sum + state->integral_term;
    const float rate = pressure_rate(calibration, state);
    const float derivative = derivative_gain_at(calibration) * normalise(rate, gauge);
    output->derivative_term = derivative;
    sum = sum + derivative;
    return sum;
}

/* Piecewise linear value over one axis, held constant outside it. */
static float interpolate_curve(const float axis[], int32_t axis_count, const float values[], float x)
{
    const int32_t index = locate(axis, axis_count, x);
    const float fraction = fraction_between(axis[index], axis[index + 1], x);
    return blend(values[index], values[index + 1], fraction);
}

/* Opening within the actuator's range. Not a number opens: the safe side of a wastegate is open. */
static float limit_opening(const skarn24_boost_calibration_t *calibration, float opening_ratio)
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
static float opening_for(const skarn24_boost_calibration_t *calibration, float coordinate)
{
    const float opening =
        interpolate_curve(calibration->gate_area_values, 9, calibration->gate_area_axis, coordinate);
    return limit_opening(calibration, opening);
}

/* The only place where the mode changes. The first line that applies wins:
 *   fail_safe    a signal that the loop cannot do without has failed
 *   start        such a signal has not given a good sample yet
 *   guard        the overspeed guard holds the gate further open than the loop wants
 *   no_boost     the wanted pressure is about ambient
 *   closed_loop  otherwise
 */
static skarn24_boost_mode_t choose_mode(bool failed, bool ready, bool guard_active, bool boost_wanted)
{
    skarn24_boost_mode_t mode = SKARN24_BOOST_MODE_CLOSED_LOOP;
    if (failed) {
        mode = SKARN24_BOOST_MODE_FAIL_SAFE;
    } else if (!ready) {
        mode = SKARN24_BOOST_MODE_START;
    } else if (guard_active) {
        mode = SKARN24_BOOST_MODE_GUARD;
    } else if (!boost_wanted) {
        mode = SKARN24_BOOST_MODE_NO_BOOST;
    } else {
        /* nothing to do */
    }
    return mode;
}

/* Opening the slow step commands: safe, at rest, or the loop's, the last two within the actuator's slew.
 * While a trip holds the gate open it stays there, so that the release closes the gate within the slew as
 * well.
 */
static float commanded_opening(const skarn24_boost_calibration_t *calibration,
    const skarn24_boost_slow_state_t *state, skarn24_boost_mode_t mode, bool boost_wanted, bool tripped,
    float loop_opening_ratio)
{
    float wanted = loop_opening_ratio;
    if (!boost_wanted) {
        wanted = calibration->rest_opening_ratio;
    }
    float opening = rate_limit(state->opening_ratio, wanted, calibration->slew_open_ratio_per_s,
        calibration->slew_close_ratio_per_s, STEP_S);
    if ((mode == SKARN24_BOOST_MODE_START) || (mode == SKARN24_BOOST_MODE_FAIL_SAFE)) {
        opening = calibration->safe_opening_ratio;
    }
    if (tripped) {
        opening = calibration->opening_high_ratio;
    }
    return opening;
}

/* The same reading for long while a companion signal moved: a frozen sensor. Call with finite samples
 * only. A companion that is not above zero is not known yet: no verdict until it is.
 */
static bool stands_still(const skarn24_boost_stuck_check_calibration_t *calibration,
    skarn24_boost_stuck_check_state_t *state, float raw, float companion)
{
    if (!same(raw, state->last_raw) || !(state->companion_anchor > 0.0f)) {
        state->last_raw = raw;
        state->companion_anchor = companion;
        state->same_steps = 0;
    } else if (state->same_steps < calibration->steps) {
        state->same_steps = state->same_steps + 1;
    } else {
        /* nothing to do */
    }
    const bool moved = fabsf(companion - state->companion_anchor) > calibration->moved;
    return (state->same_steps >= calibration->steps) && moved;
}

/* Judges the raw turbo speed and keeps its debounce. A frozen sensor is recognised by the boost having
 * moved.
 */
static void judge_turbo_speed(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_fast_state_t *state, float raw, float boost_pressure_kpa)
{
    bool suspect = outside_range(&calibration->turbo_speed, raw);
    const bool too_fast = moved_too_fast(&calibration->turbo_speed_rate, &state->turbo_speed_rate, raw,
        suspect, state->turbo_speed.failed);
    suspect = suspect || too_fast;
    if (!suspect) {
        suspect = stands_still(&calibration->turbo_speed_stuck, &state->turbo_speed_stuck, raw,
            boost_pressure_kpa);
    }
    debounce(&calibration->turbo_speed, &state->turbo_speed, raw, suspect);
}

/* Over the mechanical limit now, whatever the other checks say: a finite reading at or above it, or any
 * reading above the believable range, infinity included, while the last good one was in the guard's band.
 */
static bool compute_over_mechanical_limit(const skarn24_boost_calibration_t *calibration,
    const skarn24_boost_fast_state_t *state, float raw)
{
    const bool run_away = (raw > calibration->turbo_speed.high)
        && (state->turbo_speed.last_good >= calibration->guard_reference_speed_rpm);
    return (is_finite(raw) && (raw >= calibration->speed_limit_rpm)) || run_away;
}

/* Speed the guard acts on, rpm, never lower than a reading inside the believable range: while the sensor
 * is doubted, the last good reading plus the fastest plausible gain for as long as the doubt lasts, since
 * a hidden overspeed kills.
 */
static float guard_speed(const skarn24_boost_calibration_t *calibration, skarn24_boost_fast_state_t *state,
    float raw)
{
    float speed = state->turbo_speed.last_good;
    if (state->turbo_speed.suspect) {
        if (!state->turbo_speed.failed) {
            state->suspect_gain_rpm = state->suspect_gain_rpm + calibration->turbo_speed_gain_per_step_rpm;
        }
        speed = speed + state->suspect_gain_rpm;
    } else {
        state->suspect_gain_rpm = 0.0f;
    }
    if (raw <= calibration->turbo_speed.high) {
        speed = max_of(raw, speed);
    }
    return speed;
}

/* Last good speed for the prediction, rpm, filtered if the spec asks for it. While the sensor is doubted
 * it stands still: the assumed gain belongs to the speed now, and must not look like acceleration.
 */
static float filtered_turbo_speed(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_fast_state_t *state)
{
    float filtered = state->turbo_speed.last_good;
    filtered =
        low_pass(&state->turbo_speed_filter, filtered, calibration->turbo_speed_filter_s, GUARD_STEP_S);
    return filtered;
}

/* Turbo acceleration, rpm/s, over the whole window: one quantum of a counting sensor then moves it little.
 * Zero until the window is filled.
 *   a = (N[k] - N[k-n]) / (n dt)
 */
static float turbo_acceleration(skarn24_boost_fast_state_t *state, float speed_rpm)
{
    const float oldest = state->speed_history_rpm[state->speed_history_next];
    float acceleration = 0.0f;
    if (state->speed_history_filled) {
        acceleration = (speed_rpm - oldest) / 0x1.99999ap-5f /* 0.05 */;
    }
    state->speed_history_rpm[state->speed_history_next] = speed_rpm;
    if ((state->speed_history_next + 1) >= ACCELERATION_STEPS) {
        state->speed_history_next = 0;
        state->speed_history_filled = true;
    } else {
        state->speed_history_next = state->speed_history_next + 1;
    }
    return acceleration;
}

/* Speed one lead time ahead, rpm, never below the speed now; the speed now until there has been a good
 * reading, so that neither filter nor history starts from a bad one.
 */
static float predicted_speed(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_fast_state_t *state, float speed_rpm)
{
    float predicted = speed_rpm;
    if (state->turbo_speed.has_good) {
        const float filtered = filtered_turbo_speed(calibration, state);
        const float acceleration = turbo_acceleration(state, filtered);
        predicted = max_of(filtered + (calibration->guard_lead_s * acceleration), speed_rpm);
    }
    return predicted;
}

/* Fully open in the feedback coordinate: 1, or the gate's largest effective area, mm2. */
static float highest_coordinate(const skarn24_boost_calibration_t *calibration)
{
    return calibration->gate_area_values[8];
}

/* Floor under the gate, in the feedback coordinate, within closed .. fully open.
 *   floor = base(engine speed) + g (predicted - reference) + integral;  integral += g w (speed -
 *   reference) dt
 * The base is the feedforward at a safe pressure ratio: a floor that starts from closed comes too late.
 * Own design.
 */
static float guard_floor(const skarn24_boost_calibration_t *calibration, skarn24_boost_fast_state_t *state,
    float base, float predicted_rpm, float speed_rpm)
{
    const float open = highest_coordinate(calibration);
    const float over = speed_rpm - calibration->guard_reference_speed_rpm;
    const float integral_rate =
        (calibration->guard_gain_per_rpm * calibration->guard_integral_rate_per_s) * over;
    state->guard_integral_term =
        clamp(state->guard_integral_term + (integral_rate * GUARD_STEP_S), 0.0f, open);
    const float proportional =
        calibration->guard_gain_per_rpm * (predicted_rpm - calibration->guard_reference_speed_rpm);
    return clamp((base + proportional) + state->guard_integral_term, 0.0f, open);
}

/* Reduction of the boost target, kPa: taken at once in proportion to the predicted excess, given back
 * slowly; at most what leads from the ceiling down to no boost.
 */
static float target_reduction(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_fast_state_t *state, float predicted_rpm)
{
    const float excess = max_of(predicted_rpm - calibration->guard_reference_speed_rpm, 0.0f);
    const float wanted = calibration->guard_target_reduction_kpa_per_rpm * excess;
    const float released = max_of(state->target_reduction_kpa
        - (calibration->guard_target_release_kpa_per_s * GUARD_STEP_S), 0.0f);
    const float most =
        max_of(calibration->boost_ceiling_kpa - calibration->ambient_pressure_otherwise_kpa, 0.0f);
    state->target_reduction_kpa = min_of(max_of(wanted, released), most);
    return state->target_reduction_kpa;
}

/* Releases after the speed has stayed low, once the driver has lifted or long enough has passed. */
static void update_release(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_fast_state_t *state, float speed_rpm, float accelerator_ratio)
{
    bool low = false;
    if (speed_rpm < calibration->trip_release_below_rpm) {
        if (state->below_release_steps >= calibration->trip_release_after_steps) {
            low = true;
        } else {
            state->below_release_steps = state->below_release_steps + 1;
        }
    } else {
        state->below_release_steps = 0;
    }
    bool waited = false;
    if (state->tripped_steps >= calibration->trip_or_after_steps) {
        waited = true;
    } else {
        state->tripped_steps = state->tripped_steps + 1;
    }
    const bool lifted = accelerator_ratio < calibration->trip_accelerator_below_ratio;
    if (low && (lifted || waited)) {
        state->tripped = false;
    }
}

/* Trips at once over the mechanical limit, or when the speed has been at the ceiling for
 * `trip_after_steps`.
 */
static void update_trip(const skarn24_boost_calibration_t *calibration, skarn24_boost_fast_state_t *state,
    float speed_rpm, bool over_mechanical_limit)
{
    bool trips = over_mechanical_limit;
    if (speed_rpm >= calibration->speed_ceiling_rpm) {
        if (state->above_ceiling_steps >= calibration->trip_after_steps) {
            trips = true;
        } else {
            state->above_ceiling_steps = state->above_ceiling_steps + 1;
        }
    } else {
        state->above_ceiling_steps = 0;
    }
    if (trips) {
        state->tripped = true;
        state->below_release_steps = 0;
        state->tripped_steps = 0;
    }
}

/* Latched trip: true means the gate opens fully and torque is limited in this same fast step. */
static bool latch_trip(const skarn24_boost_calibration_t *calibration, skarn24_boost_fast_state_t *state,
    float speed_rpm, bool over_mechanical_limit, float accelerator_ratio)
{
    if (state->tripped) {
        update_release(calibration, state, speed_rpm, accelerator_ratio);
    }
    update_trip(calibration, state, speed_rpm, over_mechanical_limit);
    return state->tripped;
}

/* ---- 4 init and steps ---------------------------------------------------------------------------- */

/* Sets both states and the exchange as after power-on: gate at its safe opening, nothing tripped, no
 * signal known.
 */
void skarn24_boost_init(const skarn24_boost_calibration_t *calibration, skarn24_boost_slow_state_t *slow,
    skarn24_boost_fast_state_t *fast, skarn24_boost_exchange_t *exchange)
{
    initialise_slow(calibration, slow);
    initialise_fast(fast);
    exchange->wanted_opening_ratio = calibration->safe_opening_ratio;
    exchange->fail_safe = false;
    exchange->accelerator_ratio = 0.0f;
    exchange->boost_pressure_kpa = 0.0f;
    exchange->guard_active = false;
    exchange->tripped = false;
    exchange->turbo_speed_ready = false;
    exchange->turbo_speed_failed = false;
    exchange->guard_base = 0.0f;
    exchange->target_reduction_kpa = 0.0f;
}

/* The slow step: the boost loop. Condition, target, feedforward and feedback, mode, arbitration,
 * anti-windup, commit.
 */
void skarn24_boost_step_boost(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_slow_state_t *state, skarn24_boost_exchange_t *exchange,
    const skarn24_boost_slow_input_t *input, skarn24_boost_slow_output_t *output)
{
    const bool guard_active = exchange->guard_active;
    const bool tripped = exchange->tripped;
    const bool speed_ready = exchange->turbo_speed_ready;
    const bool speed_failed = exchange->turbo_speed_failed;
    const float reduction = exchange->target_reduction_kpa;
    condition_slow_signals(calibration, state, input);
    const float requested = requested_boost(calibration, &state->measured);
    const float wanted = min_of(requested, boost_ceiling(calibration, &state->measured));
    output->boost_wanted_kpa = wanted;
    const bool restart = tripped || (state->mode == SKARN24_BOOST_MODE_START)
        || (state->mode == SKARN24_BOOST_MODE_FAIL_SAFE);
    const float target = follow_target(calibration, state, wanted, reduction, restart);
    const bool boost_wanted = wants_boost(calibration, state);
    const float unlimited = sum_of_terms(calibration, state, target, output);
    const float loop_opening = opening_for(calibration, unlimited);
    const bool failed = state->boost_pressure.failed || speed_failed;
    const bool ready = state->boost_pressure.has_good && speed_ready;
    state->mode = choose_mode(failed, ready, guard_active, boost_wanted);
    state->opening_ratio =
        commanded_opening(calibration, state, state->mode, boost_wanted, tripped, loop_opening);
    if (boost_wanted && ready && !failed && !tripped) {
        update_integral(calibration, state, loop_opening, guard_active);
    } else {
        fade_integral(calibration, state);
    }
    report(state, output);
    commit(calibration, state, exchange, failed);
}

/* The fast step: watches the turbo's speed and has the last word on gate and torque. Call it every guard
 * step, before the slow step when both fall together; it may interrupt the slow step anywhere.
 */
void skarn24_boost_step_guard(const skarn24_boost_calibration_t *calibration,
    skarn24_boost_fast_state_t *state, skarn24_boost_exchange_t *exchange,
    const skarn24_boost_fast_input_t *input, skarn24_boost_fast_output_t *output)
{
    const float wanted_opening = exchange->wanted_opening_ratio;
    bool fail_safe = exchange->fail_safe;
    float command = wanted_opening;
    float torque_limit = 1.0f;
    const float raw = input->turbo_speed_rpm;
    const bool over_mechanical = compute_over_mechanical_limit(calibration, state, raw);
    judge_turbo_speed(calibration, state, raw, exchange->boost_pressure_kpa);
    const float speed = guard_speed(calibration, state, raw);
    fail_safe = fail_safe || state->turbo_speed.failed;
    if (fail_safe) {
        command = calibration->safe_opening_ratio;
        torque_limit = calibration->fail_safe_torque_ratio;
    }
    const float base = exchange->guard_base;
    const float predicted = predicted_speed(calibration, state, speed);
    const float floor = guard_floor(calibration, state, base, predicted, speed);
    const float floor_opening = opening_for(calibration, floor);
    bool guard_active = floor_opening > wanted_opening;
    command = max_of(command, floor_opening);
    exchange->target_reduction_kpa = target_reduction(calibration, state, predicted);
    output->guard_floor = floor;
    command = limit_opening(calibration, command);
    const bool over_limit =
        latch_trip(calibration, state, speed, over_mechanical, exchange->accelerator_ratio);
    if (over_limit) {
        command = calibration->opening_high_ratio;
        torque_limit = min_of(torque_limit, calibration->trip_torque_ratio);
        guard_active = true;
    }
    exchange->guard_active = guard_active;
    exchange->tripped = over_limit;
    exchange->turbo_speed_ready = usable(&state->turbo_speed);
    exchange->turbo_speed_failed = state->turbo_speed.failed;
    output->over_limit = over_limit;
    output->guard_active = guard_active;
    output->turbo_speed_suspect = state->turbo_speed.suspect;
    output->turbo_speed_failed = state->turbo_speed.failed;
    output->wastegate_command_ratio = command;
    output->torque_limit_ratio = torque_limit;
    output->fail_safe = fail_safe;
}

/* Looks at every calibration value: finite, within its range, axes and pairs in order. */
int32_t skarn24_boost_check_calibration(const skarn24_boost_calibration_t *calibration)
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
    bad = bad_real(calibration->boost_pressure_rate.most_change, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 14,
        bad);
    bad = bad_count(calibration->boost_pressure_rate.window_steps, 1, 1000000, 15, bad);
    bad = bad_real(calibration->boost_pressure_filter_s, 0.0f, 1000.0f, 16, bad);
    bad = bad_real(calibration->ambient_pressure.low, 1.0f, 2000.0f, 17, bad);
    bad = bad_real(calibration->ambient_pressure.high, 1.0f, 2000.0f, 18, bad);
    bad = bad_rise(calibration->ambient_pressure.low, calibration->ambient_pressure.high, 18, bad);
    bad = bad_count(calibration->ambient_pressure.after_steps, 0, 1000000, 19, bad);
    bad = bad_count(calibration->ambient_pressure.heals_after_steps, 0, 1000000, 20, bad);
    bad = bad_real(calibration->ambient_pressure_otherwise_kpa, 1.0f, 2000.0f, 21, bad);
    bad = bad_real(calibration->charge_temperature.low, 100.0f, 2000.0f, 22, bad);
    bad = bad_real(calibration->charge_temperature.high, 100.0f, 2000.0f, 23, bad);
    bad = bad_rise(calibration->charge_temperature.low, calibration->charge_temperature.high, 23, bad);
    bad = bad_count(calibration->charge_temperature.after_steps, 0, 1000000, 24, bad);
    bad = bad_count(calibration->charge_temperature.heals_after_steps, 0, 1000000, 25, bad);
    bad = bad_real(calibration->turbo_speed.low, 0.0f, 1000000.0f, 26, bad);
    bad = bad_real(calibration->turbo_speed.high, 0.0f, 1000000.0f, 27, bad);
    bad = bad_rise(calibration->turbo_speed.low, calibration->turbo_speed.high, 27, bad);
    bad = bad_count(calibration->turbo_speed.after_steps, 0, 1000000, 28, bad);
    bad = bad_count(calibration->turbo_speed.heals_after_steps, 0, 1000000, 29, bad);
    bad =
        bad_real(calibration->turbo_speed_rate.most_change, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 30, bad);
    bad = bad_count(calibration->turbo_speed_rate.window_steps, 1, 1000000, 31, bad);
    bad = bad_count(calibration->turbo_speed_stuck.steps, 0, 1000000, 32, bad);
    bad = bad_real(calibration->turbo_speed_stuck.moved, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 33, bad);
    bad = bad_real(calibration->turbo_speed_filter_s, 0.0f, 1000.0f, 34, bad);
    bad = bad_real(calibration->turbo_speed_gain_per_step_rpm, 0.0f, 1000000.0f, 35, bad);
    bad = bad_array(calibration->target_boost_rows, 6, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 36, bad);
    bad = bad_axis(calibration->target_boost_rows, 6, 36, bad);
    bad = bad_array(calibration->target_boost_columns, 6, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 42, bad);
    bad = bad_axis(calibration->target_boost_columns, 6, 42, bad);
    bad = bad_array(calibration->target_boost_values, 36, 0.0f, 2000.0f, 48, bad);
    bad = bad_real(calibration->air_reference_temperature_k, 100.0f, 2000.0f, 84, bad);
    bad = bad_real(calibration->air_strength_ratio, 0.0f, 2.0f, 85, bad);
    bad = bad_real(calibration->air_at_most_ratio, 0.0f, 1.0f, 86, bad);
    bad = bad_real(calibration->boost_ceiling_kpa, 1.0f, 2000.0f, 87, bad);
    bad = bad_real(calibration->pressure_ratio_ceiling, 1.0f, 1000.0f, 88, bad);
    bad = bad_real(calibration->least_boost_kpa, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 89, bad);
    bad = bad_real(calibration->target_rise_kpa_per_s, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 90, bad);
    bad = bad_real(calibration->target_fall_kpa_per_s, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 91, bad);
    bad = bad_array(calibration->gate_area_axis, 9, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 92, bad);
    bad = bad_axis(calibration->gate_area_axis, 9, 92, bad);
    bad = bad_array(calibration->gate_area_values, 9, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 101, bad);
    bad = bad_axis(calibration->gate_area_values, 9, 101, bad);
    bad = bad_array(calibration->feedforward_rows, 6, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 110, bad);
    bad = bad_axis(calibration->feedforward_rows, 6, 110, bad);
    bad = bad_array(calibration->feedforward_columns, 8, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 116, bad);
    bad = bad_axis(calibration->feedforward_columns, 8, 116, bad);
    bad = bad_array(calibration->feedforward_values, 48, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 124, bad);
    bad = bad_real(calibration->proportional_gain, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 172, bad);
    bad = bad_real(calibration->integral_gain, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 173, bad);
    bad = bad_real(calibration->derivative_gain, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 174, bad);
    bad = bad_real(calibration->derivative_filter_s, 0.0f, 1000.0f, 175, bad);
    bad = bad_real(calibration->setpoint_weight_ratio, 0.0f, 2.0f, 176, bad);
    bad = bad_real(calibration->trim_low, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 177, bad);
    bad = bad_real(calibration->trim_high, -0x1.dcd65p+29f /* -1000000000 */,
        0x1.dcd65p+29f /* 1000000000 */, 178, bad);
    bad = bad_rise(calibration->trim_low, calibration->trim_high, 178, bad);
    bad = bad_real(calibration->windup_band, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 179, bad);
    bad = bad_real(calibration->windup_still_below, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 180, bad);
    bad = bad_real(calibration->opening_low_ratio, 0.0f, 1.0f, 181, bad);
    bad = bad_real(calibration->opening_high_ratio, 0.0f, 1.0f, 182, bad);
    bad = bad_rise(calibration->opening_low_ratio, calibration->opening_high_ratio, 182, bad);
    bad = bad_real(calibration->slew_open_ratio_per_s, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 183, bad);
    bad = bad_real(calibration->slew_close_ratio_per_s, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 184, bad);
    bad = bad_real(calibration->safe_opening_ratio, 0.0f, 1.0f, 185, bad);
    bad = bad_order(calibration->opening_low_ratio, calibration->safe_opening_ratio, 185, bad);
    bad = bad_order(calibration->safe_opening_ratio, calibration->opening_high_ratio, 185, bad);
    bad = bad_real(calibration->rest_opening_ratio, 0.0f, 1.0f, 186, bad);
    bad = bad_order(calibration->opening_low_ratio, calibration->rest_opening_ratio, 186, bad);
    bad = bad_order(calibration->rest_opening_ratio, calibration->opening_high_ratio, 186, bad);
    bad = bad_real(calibration->speed_limit_rpm, 0.0f, 1000000.0f, 187, bad);
    bad = bad_real(calibration->speed_ceiling_rpm, 0.0f, 1000000.0f, 188, bad);
    bad = bad_order(calibration->speed_ceiling_rpm, calibration->speed_limit_rpm, 188, bad);
    bad = bad_real(calibration->guard_lead_s, 0.0f, 1000.0f, 189, bad);
    bad = bad_real(calibration->guard_reference_speed_rpm, 0.0f, 1000000.0f, 190, bad);
    bad = bad_real(calibration->guard_gain_per_rpm, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 191, bad);
    bad = bad_real(calibration->guard_integral_rate_per_s, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 192, bad);
    bad = bad_real(calibration->guard_safe_pressure_ratio, 1.0f, 1000.0f, 193, bad);
    bad = bad_real(calibration->guard_target_reduction_kpa_per_rpm, 0.0f, 0x1.dcd65p+29f /* 1000000000 */,
        194, bad);
    bad = bad_real(calibration->guard_target_release_kpa_per_s, 0.0f, 0x1.dcd65p+29f /* 1000000000 */, 195,
        bad);
    bad = bad_count(calibration->trip_after_steps, 0, 1000000, 196, bad);
    bad = bad_real(calibration->trip_torque_ratio, 0.0f, 1.0f, 197, bad);
    bad = bad_real(calibration->trip_release_below_rpm, 0.0f, 1000000.0f, 198, bad);
    bad = bad_rise(calibration->trip_release_below_rpm, calibration->speed_ceiling_rpm, 198, bad);
    bad = bad_count(calibration->trip_release_after_steps, 0, 1000000, 199, bad);
    bad = bad_real(calibration->trip_accelerator_below_ratio, 0.0f, 1.0f, 200, bad);
    bad = bad_count(calibration->trip_or_after_steps, 0, 1000000, 201, bad);
    bad = bad_real(calibration->fail_safe_torque_ratio, 0.0f, 1.0f, 202, bad);
    return bad;
}
