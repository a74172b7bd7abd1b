/** Standard acceleration of free fall, m/s². Source: 3rd CGPM (1901), ISO 80000-3. */
export const FREE_FALL = 9.80665;

/**
 * Weight along an axis, N: m·g·sin(incline) − counterbalance; m in kg, incline in deg (0 level, 90 straight up),
 * counterbalance in N. Source: resolution of forces.
 */
export function weightAlongAxis(input: {
  readonly mass: number;
  readonly inclineDeg: number;
  readonly counterbalance: number;
}): number {
  const sine = Math.sin((input.inclineDeg * Math.PI) / 180);
  return input.mass * FREE_FALL * sine - input.counterbalance;
}

/** Torque at each of n motors, N·m, that carries a weight (N) at r metres per radian: |W|·r/n; friction is not counted on. */
export function weightTorque(input: {
  readonly weight: number;
  readonly radius: number;
  readonly motors: number;
}): number {
  return (Math.abs(input.weight) / input.motors) * input.radius;
}

/**
 * Acceleration, m/s², with which an axis falls once its current is gone: (|W| − F_f − n·T_d/r)/(m + n·J/r²), 0 where
 * friction and detent torque hold it. W weight along the axis and F_f friction in N, T_d detent torque of each of n motors
 * in N·m, r in m/rad, m in kg, J rotor and drive train at each shaft in kg·m². The worst case: the friction of the drive
 * train is not counted on. Source: Newton's second law.
 */
export function fallAcceleration(input: {
  readonly weight: number;
  readonly friction: number;
  readonly detentTorque: number;
  readonly motors: number;
  readonly radius: number;
  readonly mass: number;
  readonly shaftInertia: number;
}): number {
  const { radius, motors } = input;
  const drive = Math.abs(input.weight) - input.friction - (motors * input.detentTorque) / radius;
  const inertia = input.mass + (motors * input.shaftInertia) / radius ** 2;
  return inertia > 0 ? Math.max(0, drive) / inertia : 0;
}

/** Way, m, fallen from rest in the time t (s) at the acceleration a (m/s²): a·t²/2. Source: kinematics. */
export function fallDistance(acceleration: number, time: number): number {
  return (acceleration * time ** 2) / 2;
}
