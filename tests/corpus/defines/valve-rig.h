#pragma once

#define LIFT_RUN_MA 600
#if defined(HEAVY_TABLE)
  #undef LIFT_RUN_MA
  #define LIFT_RUN_MA 900
  #define LIFT_ACCEL 150
#elif TABLE_MASS > 4
  #define LIFT_ACCEL 250
#else
  #define LIFT_ACCEL 400
#endif

#ifndef LIFT_HOLD_MA
#define LIFT_HOLD_MA 300
#endif

#if 0
#define TURN_RUN_MA 1000
#else
#define TURN_RUN_MA 700
#endif

#define TURN_SPEED 40 /* deg/s */ // measured
#define TURN_SPEED 45
#undef TURN_LIMIT

static const int spare = 4; /* kept */
extern int other;
