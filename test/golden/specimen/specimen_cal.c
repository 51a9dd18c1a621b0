/* specimen_cal.c - calibration values only; no code
 * Every operator and statement once; no controller
 * Generated from specimen.yaml, meaning 3c6a8279d628d160. Edit that file instead of this one.
 * In each comment: [index that the calibration check returns] value, unit, (as written), place in the
 * spec.
 */
#include "specimen.h"

const specimen_calibration_t specimen_calibration_default = {
    /* [0] kPa  specimen.yaml:7 */
    .curve_axis = {
        /* 0 50 100 */
        0x0p+0f, 0x1.9p+5f, 0x1.9p+6f,
    },
    /* [3] kPa  specimen.yaml:8 */
    .curve_values = {
        /* 0.1 7 12.5 */
        0x1.99999ap-4f, 0x1.cp+2f, 0x1.9p+3f,
    },
    .limits = {
        .low = -0x1.4p+4f, /* [6] -20 kPa  specimen.yaml:9 */
        .high = 0x1.2c199ap+8f, /* [7] 300.1 kPa  specimen.yaml:10 */
    },
    .steps = 3, /* [8] 3 steps of 10 ms  (30 ms)  specimen.yaml:11 */
    .armed = true, /* [9] true  specimen.yaml:12 */
};
