/* skarn_smallest.h - the contract of the controller
 * PI boost loop of the Skarn Hill test rig (invented)
 * Generated from smallest.yaml, meaning HASH. Edit that file instead of this one.
 * Contents: 1 types  2 calibration  3 functions
 */

/* CAUTION:
 * Prototype code, not a certified product: test it on the target and on a bench before any engine.
 * Keep an independent mechanical or electrical overspeed and overboost protection.
 * Local rules and a qualified engineer decide whether and how this may run.
 */
#ifndef SKARN_SMALLEST_H
#define SKARN_SMALLEST_H

#include <stdbool.h>
#include <stdint.h>

#ifdef __cplusplus
extern "C" {
#endif

/* ---- 1 types ------------------------------------------------------------------------------------- */

/* What the slow step is doing. */
typedef enum {
    SKARN_SMALLEST_MODE_START = 0,
    SKARN_SMALLEST_MODE_NO_BOOST = 1,
    SKARN_SMALLEST_MODE_CLOSED_LOOP = 2,
    SKARN_SMALLEST_MODE_GUARD = 3,
    SKARN_SMALLEST_MODE_FAIL_SAFE = 4
} skarn_smallest_mode_t;

/* Believable range of a signal and its debounce, in steps of its task. */
typedef struct {
    float low;
    float high;
    int32_t after_steps;
    int32_t heals_after_steps;
} skarn_smallest_signal_calibration_t;

/* Calibration: constant while a step runs; check it before the first step.
 * Every number that can change without generating code again. Pressures kPa, speeds rpm, temperatures K,
 * openings and fractions 0..1, areas mm2, times s; durations that are counted are whole steps of their
 * task. "Coordinate" is mm2 of effective wastegate area, or opening 0..1, as the spec chooses.
 */
typedef struct {
    skarn_smallest_signal_calibration_t engine_speed;
    float engine_speed_otherwise_rpm; /* rpm, 0 to 1000000 */
    skarn_smallest_signal_calibration_t accelerator;
    float accelerator_otherwise_ratio; /* ratio, 0 to 1 */
    skarn_smallest_signal_calibration_t boost_pressure;
    skarn_smallest_signal_calibration_t ambient_pressure;
    float ambient_pressure_otherwise_kpa; /* kPa, 1 to 2000 */
    /* Rows over accelerator, columns over engine speed; kPa abs, kPa gauge or pressure ratio. */
    float target_boost_rows[3]; /* ratio */
    float target_boost_columns[3]; /* rpm */
    float target_boost_values[9]; /* kPa abs, 0 to 2000 */
    float boost_ceiling_kpa; /* kPa abs, 1 to 2000 */
    float least_boost_kpa; /* kPa */
    float target_rise_kpa_per_s; /* kPa/s */
    float target_fall_kpa_per_s; /* kPa/s */
    float proportional_gain; /* ratio/kPa */
    float integral_gain; /* ratio/kPa/s */
    float setpoint_weight_ratio; /* ratio, 0 to 2 */
    float trim_low; /* ratio */
    float trim_high; /* ratio */
    float tracking_time_s; /* s, 0.000001 to 1000 */
    float opening_low_ratio; /* ratio, 0 to 1 */
    float opening_high_ratio; /* ratio, 0 to 1 */
    float slew_open_ratio_per_s; /* 1/s */
    float slew_close_ratio_per_s; /* 1/s */
    float safe_opening_ratio; /* ratio, 0 to 1 */
    float rest_opening_ratio; /* ratio, 0 to 1 */
    float fail_safe_torque_ratio; /* ratio, 0 to 1 */
} skarn_smallest_calibration_t;

/* This step's conditioned signals. */
typedef struct {
    float engine_speed_rpm;
    float accelerator_ratio;
    float boost_pressure_kpa;
    float ambient_pressure_kpa;
} skarn_smallest_measured_t;

typedef struct {
    float last_good;
    bool has_good;
    bool failed;
    int32_t suspect_steps;
    int32_t good_steps;
} skarn_smallest_signal_state_t;

/* State: the caller's memory, set by init, touched by the steps only.
 * What the slow step remembers.
 */
typedef struct {
    skarn_smallest_measured_t measured;
    skarn_smallest_signal_state_t engine_speed;
    skarn_smallest_signal_state_t accelerator;
    skarn_smallest_signal_state_t boost_pressure;
    skarn_smallest_signal_state_t ambient_pressure;
    skarn_smallest_mode_t mode;
    float target_kpa;
    bool boost_wanted;
    /* Integral term in the feedback coordinate, so that a changed gain causes no jump. */
    float integral_term;
    float opening_ratio;
} skarn_smallest_slow_state_t;

/* Exchange between the tasks, on one core: every field has one writer and fits one access, and a step
 * reads or writes it once. No lock is needed.
 * Between the two tasks. The fast step may interrupt the slow one anywhere, never the other way round.
 * Every field has one writer, fits one 32-bit access and is read once per step; the slow step commits its
 * fields last, in an order in which every prefix is safe. No lock is needed.
 */
typedef struct {
    volatile float wanted_opening_ratio;
    volatile bool fail_safe;
} skarn_smallest_exchange_t;

/* Input: sampled by the caller before the step; any bit pattern is allowed.
 * Sampled once per slow step; any bit pattern is allowed.
 */
typedef struct {
    float engine_speed_rpm;
    float accelerator_ratio;
    float boost_pressure_kpa;
    float ambient_pressure_kpa;
} skarn_smallest_slow_input_t;

/* Output: set by the step.
 * Set by every slow step: what a calibration engineer plots.
 */
typedef struct {
    /* After ceilings, before the guard's reduction and the slew. */
    float boost_wanted_kpa;
    /* What the loop follows. */
    float boost_target_kpa;
    skarn_smallest_mode_t mode;
    float feedforward_term;
    float proportional_term;
    float integral_term;
    float wanted_opening_ratio;
    bool engine_speed_failed;
    bool accelerator_failed;
    bool boost_pressure_failed;
    bool ambient_pressure_failed;
} skarn_smallest_slow_output_t;

/* Output: set by the step.
 * Set by every fast step: what the actuator and the torque path use.
 */
typedef struct {
    /* 0 closed .. 1 open. */
    float wastegate_command_ratio;
    /* 0..1 of the driver's request. */
    float torque_limit_ratio;
    bool fail_safe;
} skarn_smallest_fast_output_t;

/* ---- 2 calibration ------------------------------------------------------------------------------- */

/* The calibration as specified. */
extern const skarn_smallest_calibration_t skarn_smallest_calibration_default;

/* ---- 3 functions --------------------------------------------------------------------------------- */

/* Time between two calls of a step, microseconds. */
#define SKARN_SMALLEST_STEP_BOOST_PERIOD_US (10000)
#define SKARN_SMALLEST_STEP_GUARD_PERIOD_US (10000)

/* Call once before the first step of either task, and to start over; only while both tasks are stopped. */
void skarn_smallest_init(const skarn_smallest_calibration_t *calibration, skarn_smallest_slow_state_t *slow,
    skarn_smallest_exchange_t *exchange);

/* The slow step; the fast step goes first when both fall together. It must never interrupt the fast step.
 * Call it every 10 ms.
 */
void skarn_smallest_step_boost(const skarn_smallest_calibration_t *calibration,
    skarn_smallest_slow_state_t *state, skarn_smallest_exchange_t *exchange,
    const skarn_smallest_slow_input_t *input, skarn_smallest_slow_output_t *output);

/* The fast step; it may interrupt the slow step anywhere. Call it every 10 ms. */
void skarn_smallest_step_guard(const skarn_smallest_calibration_t *calibration,
    const skarn_smallest_exchange_t *exchange, skarn_smallest_fast_output_t *output);

/* Call it once after the calibration was loaded or changed. Returns the index of the first bad value, or
 * -1; run no step unless it is -1. Until it is -1, hold the wastegate at its safe opening and limit engine
 * torque as in fail-safe.
 */
int32_t skarn_smallest_check_calibration(const skarn_smallest_calibration_t *calibration);

#ifdef __cplusplus
}
#endif

#endif /* SKARN_SMALLEST_H */
