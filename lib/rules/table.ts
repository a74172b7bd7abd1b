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
import { AXIS_RESONANCE } from "./axis-resonance";
import { CABLE_DROP } from "./cable-drop";
import { COUPLED_JUMP } from "./coupled-jump";
import { COUPLED_MOTORS } from "./coupled-motors";
import { FALL_AFTER_POWER_LOSS } from "./fall-after-power-loss";
import { INDUCTANCE_RULE } from "./inductance-rule";
import { INERTIA_RATIO } from "./inertia-ratio";
import { LOWERING_VOLTAGE } from "./lowering-voltage";
import { MICROSTEP_FRICTION } from "./microstep-friction";
import { RAMP_TORQUE_MARGIN } from "./ramp-torque-margin";
import { REFERENCE_RUN } from "./reference-run";
import { SOFT_TRAVEL } from "./soft-travel";
import { STATIC_POSITION } from "./static-position";
import { SUPPLY_DRIVES_CURRENT } from "./supply-drives-current";
import { SUPPLY_OVERDRIVE } from "./supply-overdrive";
import { SUPPLY_POWER } from "./supply-power";
import { WINDING_CLASS } from "./winding-class";

/** Every check, in the order in which pages list them. */
export const RULES: readonly Rule[] = [
  RUN_CURRENT_MOTOR,
  RUN_CURRENT_DRIVER,
  SET_POINT,
  DRIVER_JUNCTION,
  SENSE_RESISTOR,
  WINDING_TEMPERATURE,
  WINDING_CLASS,
  MOUNT_TEMPERATURE,
  TOUCH_TEMPERATURE,
  STEPS_PER_MM,
  STEP_RATE,
  TORQUE_MARGIN,
  RAMP_TORQUE_MARGIN,
  CORNER_SPEED,
  HOLD_TORQUE,
  FALL_AFTER_POWER_LOSS,
  STATIC_POSITION,
  SUPPLY_VOLTAGE,
  BRAKING_VOLTAGE,
  LOWERING_VOLTAGE,
  SUPPLY_POWER,
  CABLE_DROP,
  SUPPLY_DRIVES_CURRENT,
  SUPPLY_OVERDRIVE,
  INDUCTANCE_RULE,
  RESONANCE,
  AXIS_RESONANCE,
  SPEED_REACHED,
  SOFT_TRAVEL,
  REFERENCE_RUN,
  MICROSTEP_CURRENT,
  MICROSTEP_FRICTION,
  INERTIA_RATIO,
  COUPLED_MOTORS,
  COUPLED_JUMP,
];
