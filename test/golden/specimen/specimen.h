/* specimen.h - the contract of the controller
 * Every operator and statement once; no controller
 * Generated from specimen.yaml, meaning 3c6a8279d628d160. Edit that file instead of this one.
 * Contents: 1 types  2 calibration  3 functions
 */

/* CAUTION:
 * A specimen: it controls nothing.
 */
#ifndef SPECIMEN_H
#define SPECIMEN_H

#include <stdbool.h>
#include <stdint.h>

#ifdef __cplusplus
extern "C" {
#endif

/* ---- 1 types ------------------------------------------------------------------------------------- */

typedef enum {
    SPECIMEN_PHASE_IDLE = 0,
    SPECIMEN_PHASE_BUSY = 1,
    SPECIMEN_PHASE_DONE = 2
} specimen_phase_t;

typedef struct {
    float low;
    float high;
} specimen_limits_t;

/* Calibration: constant while a step runs; check it before the first step. */
typedef struct {
    /* Output over input. */
    float curve_axis[3]; /* kPa */
    float curve_values[3]; /* kPa */
    specimen_limits_t limits;
    int32_t steps; /* steps of 10 ms, 0 to 1000 */
    bool armed;
} specimen_calibration_t;

typedef struct {
    float value;
    bool primed;
} specimen_inner_t;

/* State: the caller's memory, set by init, touched by the steps only. */
typedef struct {
    specimen_inner_t inner;
    specimen_phase_t phase;
    float history[4];
    int32_t next;
} specimen_state_t;

/* Exchange between the tasks, on one core: every field has one writer and fits one access, and a step
 * reads or writes it once. No lock is needed.
 */
typedef struct {
    volatile float level;
} specimen_exchange_t;

/* Input: sampled by the caller before the step; any bit pattern is allowed. */
typedef struct {
    float value_kpa;
    bool enable;
} specimen_input_t;

/* Output: set by the step. */
typedef struct {
    float result_kpa;
    specimen_phase_t phase;
    int32_t count;
    bool flag;
} specimen_output_t;

/* ---- 2 calibration ------------------------------------------------------------------------------- */

/* The calibration as specified. */
extern const specimen_calibration_t specimen_calibration_default;

/* ---- 3 functions --------------------------------------------------------------------------------- */

/* Time between two calls of a step, microseconds. */
#define SPECIMEN_STEP_SLOW_PERIOD_US (10000)
#define SPECIMEN_STEP_FAST_PERIOD_US (1250)

/* Call once before the first step. */
void specimen_init(specimen_state_t *state, specimen_exchange_t *exchange);

/* The slow step. Call it every 10 ms. */
void specimen_step_slow(const specimen_calibration_t *calibration, specimen_state_t *state,
    const specimen_exchange_t *exchange, const specimen_input_t *input, specimen_output_t *output);

/* It may interrupt the slow step. Call it every 1.25 ms. */
void specimen_step_fast(const specimen_state_t *state, specimen_exchange_t *exchange);

/* Call it once after the calibration was loaded or changed. Returns the index of the first bad value, or
 * -1; run no step unless it is -1.
 */
int32_t specimen_check_calibration(const specimen_calibration_t *calibration);

#ifdef __cplusplus
}
#endif

#endif /* SPECIMEN_H */
