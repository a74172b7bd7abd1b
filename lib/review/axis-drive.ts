import type { AxisKind } from "@/lib/domain/axis-kind";
import { accelerationTorque, reflectedInertia } from "@/lib/physics/load-torque";
import { conservativePullOut, voltageLimitSpeed } from "@/lib/physics/pull-out";
import type { DrivenMotor } from "@/lib/physics/pull-out";
import { bothMissing, gather, hardware, merged, motorCount } from "@/lib/rules/data";
import { loadTorque, moved, shaftInertia } from "@/lib/rules/quantities/load";
import { driven } from "@/lib/rules/quantities/torque";
import type { AxisView, Missing } from "@/lib/rules/types";

/** What the motors of one axis can give and what a move asks of each: the same numbers as the checks of torque have. */
export interface AxisDrive {
  readonly ok: true;
  readonly kind: AxisKind;
  readonly motor: DrivenMotor;
  /** Travel for one radian of the motor, m (rad). */
  readonly radius: number;
  /** Steady torque at each motor, N·m. */
  readonly load: number;
  /** Inertia at each motor with the efficiency in it, kg·m². */
  readonly inertia: number;
  /** Voltage-limit speed of the axis, m/s (rad/s). */
  readonly limitSpeed: number;
  /** Torque margins of the policy up to and above the voltage-limit speed, shares of 1. */
  readonly marginBelow: number;
  readonly marginAbove: number;
  /** Paths of the defaults that the numbers rest on. */
  readonly assumed: readonly string[];
}

/** The drive of an axis, or all that is missing for it. The text's speed and acceleration are not needed. */
export function axisDrive(view: AxisView): AxisDrive | Missing {
  const motor = driven(view);
  const parts = gather({
    load: loadTorque(view),
    shaft: shaftInertia(view),
    moved: moved(view),
    motors: motorCount(view),
    efficiency: hardware(view, "drive_train", "efficiency"),
  });
  if (!motor.ok) return parts.ok ? motor : bothMissing(motor, parts);
  if (!parts.ok) return parts;
  const { load, shaft, moved: mass, motors, efficiency } = parts.values;
  return {
    ok: true,
    kind: view.kind,
    motor: motor.motor,
    radius: motor.radius,
    load,
    inertia: shaft + reflectedInertia(mass, motor.radius) / (motors * efficiency),
    limitSpeed: voltageLimitSpeed(motor.motor) * motor.radius,
    marginBelow: view.policy.torque_margin_below_limit_speed,
    marginAbove: view.policy.torque_margin_above_limit_speed,
    assumed: merged(motor.assumed, parts.assumed),
  };
}

/** Torque margin, share of 1, that the policy wants at a speed of the axis (m/s, rad/s). */
export function wantedMargin(drive: AxisDrive, speed: number): number {
  return speed > drive.limitSpeed * (1 + 1e-9) ? drive.marginAbove : drive.marginBelow;
}

/** Torque that each motor can give at a speed of the axis (m/s, rad/s), N·m, conservative. */
export function availableTorque(drive: AxisDrive, speed: number): number {
  return conservativePullOut(drive.motor, speed / drive.radius);
}

/** Torque that each motor needs at an acceleration of the axis (m/s², rad/s²), N·m. */
export function neededTorque(drive: AxisDrive, acceleration: number): number {
  return drive.load + accelerationTorque(drive.inertia, acceleration / drive.radius);
}

/**
 * Highest acceleration, m/s² (rad/s²), at a speed (m/s, rad/s) that leaves the torque margin (share of 1):
 * (T_pull-out/(1 + margin) − T_load)·r/J. 0 where even a steady run leaves less. Null where nothing has inertia.
 */
export function highestAcceleration(drive: AxisDrive, speed: number, margin: number): number | null {
  if (drive.inertia <= 0) return null;
  const spare = availableTorque(drive, speed) / (1 + margin) - drive.load;
  return (Math.max(0, spare) * drive.radius) / drive.inertia;
}
