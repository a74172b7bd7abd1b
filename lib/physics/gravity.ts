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

/**
 * Torque at each of n motors, N·m, that carries a weight: |W|·r/n; W in N, r in m/rad and more than 0, n 1 or more.
 * Friction is not counted on. Source: virtual work of a weight along r.
 */
export function weightTorque(input: {
  readonly weight: number;
  readonly radius: number;
  readonly motors: number;
}): number {
  return (Math.abs(input.weight) / input.motors) * input.radius;
}

/**
 * Acceleration, m/s², with which an axis falls once its current is gone: (|W| − F_f)/(m + n·J/r²), 0 where friction
 * carries the weight. W weight along the axis and F_f friction in N, r in m/rad, m in kg, J rotor and drive train at each
 * of n shafts in kg·m². Detent torque has no part in it: it is periodic in the rotor's angle and does no work over a tooth
 * pitch, so that it cannot slow what has begun to fall. The worst case: the friction of the drive train is not counted on.
 * Source: Newton's second law.
 */
export function fallAcceleration(input: {
  readonly weight: number;
  readonly friction: number;
  readonly motors: number;
  readonly radius: number;
  readonly mass: number;
  readonly shaftInertia: number;
}): number {
  const drive = Math.abs(input.weight) - input.friction;
  const inertia = input.mass + (input.motors * input.shaftInertia) / input.radius ** 2;
  return inertia > 0 ? Math.max(0, drive) / inertia : 0;
}

/**
 * Force, N, up to which the detent torque of n motors keeps a resting load where it is: n·T_d/r; T_d in N·m, r in m/rad.
 * It holds at rest only. Source: Acarnley, Stepping Motors (detent torque, periodic in the rotor's angle; from memory).
 */
export function detentForce(input: {
  readonly detentTorque: number;
  readonly motors: number;
  readonly radius: number;
}): number {
  return (input.motors * input.detentTorque) / input.radius;
}

/** Times the weight that detent torque must carry before a load without current counts as held; the product's choice. */
export const DETENT_RESERVE = 2;

/** Way, m, fallen from rest in the time t (s) at the acceleration a (m/s²): a·t²/2. Source: kinematics. */
export function fallDistance(acceleration: number, time: number): number {
  return (acceleration * time ** 2) / 2;
}
