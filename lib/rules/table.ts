import { BRAKING_VOLTAGE } from "./braking-voltage";
import { CORNER_SPEED } from "./corner-speed";
import { DRIVER_JUNCTION } from "./driver-junction";
import { HOLD_TORQUE } from "./hold-torque";
import { MICROSTEP_CURRENT } from "./microstep-current";
import { MOUNT_TEMPERATURE } from "./mount-temperature";
import { RESONANCE } from "./resonance";
import { RUN_CURRENT_DRIVER } from "./run-current-driver";
import { RUN_CURRENT_MOTOR } from "./run-current-motor";
import { SENSE_RESISTOR } from "./sense-resistor";
import { SET_POINT } from "./set-point";
import { SPEED_REACHED } from "./speed-reached";
import { STEP_RATE } from "./step-rate";
import { STEPS_PER_MM } from "./steps-per-mm";
import { SUPPLY_VOLTAGE } from "./supply-voltage";
import { TORQUE_MARGIN } from "./torque-margin";
import { TOUCH_TEMPERATURE } from "./touch-temperature";
import type { Rule } from "./types";
import { WINDING_TEMPERATURE } from "./winding-temperature";

/** Every check, in the order in which pages list them. */
export const RULES: readonly Rule[] = [
  RUN_CURRENT_MOTOR,
  RUN_CURRENT_DRIVER,
  SET_POINT,
  DRIVER_JUNCTION,
  SENSE_RESISTOR,
  WINDING_TEMPERATURE,
  MOUNT_TEMPERATURE,
  TOUCH_TEMPERATURE,
  STEPS_PER_MM,
  STEP_RATE,
  TORQUE_MARGIN,
  CORNER_SPEED,
  HOLD_TORQUE,
  SUPPLY_VOLTAGE,
  BRAKING_VOLTAGE,
  RESONANCE,
  SPEED_REACHED,
  MICROSTEP_CURRENT,
];
