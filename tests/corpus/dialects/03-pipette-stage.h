/* pipette stage: order of the lists is X, Y, Z */
#ifndef STAGE_SETUP_H
#define STAGE_SETUP_H

#define AXES { X, Y, Z }
#define STAGE_CURRENT_MA { 700, 700, 1000 } // rms
#define STAGE_STANDSTILL_MA { 300, 300, 600 } // rms
#define STAGE_MICROSTEPPING { 16, 16, 32 }
#define STAGE_STEPS_PER_MM { 80, 80, 1600 }
#define STAGE_MAX_VELOCITY { 250, 250, 12 } // mm/s
#define STAGE_MAX_ACCELERATION { 3000, 3000, 100 } // mm/s^2
#define STAGE_CORNER_JUMP { 8, 8, 0.5 } // mm/s
#define STAGE_TRAVEL_MAX { 280, 190, 75 } // mm
#define STAGE_REFERENCE_RUN_SPEED { 40, 40, 5 } // mm/s
#define STAGE_PULSE_WIDTH_NS 1900
#define STAGE_DIRECTION_SETUP_NS 600
#define STAGE_LED_PIN 13
#define STAGE_NAME "pipette stage"
//#define STAGE_SILENT 1

#endif
