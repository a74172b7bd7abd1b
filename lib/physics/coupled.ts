/**
 * Two axes on crossed belts: one motor turns with x + y, the other with x − y, so that the busier one meets the sum of
 * both sizes. v in m/s (or any quantity that adds with it), r in m/rad; gives rad/s. Source: kinematics of crossed belts.
 */
export function busierMotor(first: number, second: number, radius: number): number {
  return (Math.abs(first) + Math.abs(second)) / radius;
}

/**
 * Torque of the busier one of n motors on crossed belts when both axes accelerate at once, N·m:
 * (F1 + F2)·r/(n·η) + Jm·(a1 + a2)/r. F the force each axis needs at the belt in N (friction, weight and m·a), r in
 * m/rad, η share of 1, Jm rotor and pulley of one motor in kg·m², a in m/s². n is even, half of it on either belt; each
 * axis alone is carried by all of them. Source: virtual work on the kinematics of crossed belts.
 */
export function busierMotorTorque(input: {
  readonly forces: readonly [number, number];
  readonly accelerations: readonly [number, number];
  readonly motors: number;
  readonly radius: number;
  readonly efficiency: number;
  readonly motorInertia: number;
}): number {
  const { forces, accelerations, motors, radius, efficiency, motorInertia } = input;
  const load = ((Math.abs(forces[0]) + Math.abs(forces[1])) * radius) / (motors * efficiency);
  return load + motorInertia * busierMotor(accelerations[0], accelerations[1], radius);
}

/**
 * Inertia of one of n motors on crossed belts when those of its belt move and the others do not, kg·m²:
 * Jm + (m1 + m2)·r²/(2·n) for the masses of both axes in kg; r in m/rad, n even. Source: each axis moves half as far,
 * kinetic energy compared.
 */
export function crossedInertia(input: {
  readonly masses: readonly [number, number];
  readonly motors: number;
  readonly radius: number;
  readonly motorInertia: number;
}): number {
  const { masses, motors, radius, motorInertia } = input;
  return motorInertia + ((masses[0] + masses[1]) * radius ** 2) / (2 * motors);
}
