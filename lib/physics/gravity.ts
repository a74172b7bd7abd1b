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
