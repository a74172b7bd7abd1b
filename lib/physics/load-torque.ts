/**
 * Torque at the motor, N·m, for a force at the axis: F·r/η; F in N (N·m at the output of a rotary axis), r travel
 * per radian of the motor in m (1/ratio on a rotary axis), η share of 1.
 * Source: energy balance of a drive train; Oriental Motor, Selecting a motor: load torque.
 */
export function forceTorque(input: {
  readonly force: number;
  readonly radius: number;
  readonly efficiency: number;
}): number {
  return (input.force * input.radius) / input.efficiency;
}

/**
 * Inertia at the motor, kg·m², of a mass moved by r metres per radian: m·r² (rotary: load inertia·(1/ratio)²).
 * Source: equal kinetic energy.
 */
export function reflectedInertia(mass: number, radius: number): number {
  return mass * radius ** 2;
}

/** Torque, N·m, that gives an inertia J (kg·m²) an angular acceleration α (rad/s²): J·α. Source: Newton's second law. */
export function accelerationTorque(inertia: number, angularAcceleration: number): number {
  return inertia * angularAcceleration;
}

/**
 * Force against the motion, N (N·m on a rotary axis): friction + |external + weight along the axis|.
 * The worse direction of travel counts. Source: balance of forces.
 */
export function opposingForce(input: {
  readonly friction: number;
  readonly external: number;
  readonly weight: number;
}): number {
  return input.friction + Math.abs(input.external + input.weight);
}

/**
 * Torque at the motor, N·m, that the preload of a ball nut takes: μ0·F0·r; F0 in N, μ0 inner friction of the preloaded
 * nut (0.1 to 0.3, no unit), r travel for one radian of the motor in m (lead/2π).
 * Source: Oriental Motor, Selecting a motor: load torque.
 */
export function preloadTorque(input: {
  readonly preload: number;
  readonly friction: number;
  readonly radius: number;
}): number {
  return input.friction * input.preload * input.radius;
}

/** Load inertia at the shaft over the rotor's own, no unit; both in kg·m². Source: definition. */
export function inertiaRatio(load: number, rotor: number): number {
  return load / rotor;
}

/** Torque over a duty cycle, N·m rms: √(Σ T²·t/Σ t); T in N·m, t in s, together more than 0 s. Source: definition of the rms. */
export function dutyTorque(parts: readonly { readonly torque: number; readonly time: number }[]): number {
  const time = parts.reduce((sum, part) => sum + part.time, 0);
  return Math.sqrt(parts.reduce((sum, { torque, time: t }) => sum + torque ** 2 * t, 0) / time);
}
