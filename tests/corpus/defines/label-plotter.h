/*
 * Label plotter, machine settings.
 * #define OLD_BOARD 3
 */
#ifndef LABEL_PLOTTER_H
#define LABEL_PLOTTER_H

#include "pins.h"

#define MACHINE_NAME        "plotter // two"   // shown at start
#define AXES                3

// Motion: x, y, pen
#define STEPS_PER_MM        { 80, 80, 400 }
#define MAX_SPEED           { 300, 300, \
                              12 }            // mm/s
#define MAX_ACCEL           { 3000.0f, 3000.0f, 200.0f } /* mm/s2 */
#define CORNER_SPEED        (8.5)

#define X_RUN_MA            800     // rms
#define X_MICROSTEPS        16
#define X_REVERSED          false
#define Y_RUN_MA            800
//#define Y_RUN_MA          950     // before the belt was changed
#define Y_MICROSTEPS        0x10
#define PEN_RUN_MA          Y_RUN_MA
#define PEN_LIFT(t)         ((t) * 2)
/* #define PEN_HOLD_MA      200 */
#define PEN_INVERT
#define STEP_MASK           017
#define SUPPLY_MV           24000UL

#endif // LABEL_PLOTTER_H
