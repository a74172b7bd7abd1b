/**
 * Natural frequency, Hz, of a rotor in its magnetic spring: √(k/J)/2π; stiffness k in N·m/rad, inertia J in kg·m².
 * Source: harmonic oscillator.
 */
export function naturalFrequency(stiffness: number, inertia: number): number {
  return Math.sqrt(stiffness / inertia) / (2 * Math.PI);
}

/**
 * Stiffness of a stepping motor about a step, N·m/rad: Nr·T, T the holding torque at its present current, N·m.
 * Source: slope of T·sin(Nr·θ) at rest; Acarnley, Stepping Motors.
 */
export function magneticStiffness(holdingTorque: number, rotorTeeth: number): number {
  return rotorTeeth * holdingTorque;
}
