import { rotorTeeth } from "./drive-train";

/** Step pulses a second, Hz: speed (m/s or rad/s) · steps for one metre or radian. Source: definition of the scale. */
export function stepRate(speed: number, stepsPerUnit: number): number {
  return speed * stepsPerUnit;
}

/** Highest step rate, Hz, that pulses of `high` and `low` seconds leave: 1/(high + low). Source: driver data sheets' AC tables. */
export function pulseRateLimit(high: number, low: number): number {
  return 1 / (high + low);
}

/** Full steps a second, Hz, at a shaft speed (rad/s): ω·4·Nr/2π, step angle in deg. Source: four full steps a rotor tooth. */
export function fullStepRate(shaftSpeed: number, stepAngleDeg: number): number {
  return (shaftSpeed * 4 * rotorTeeth(stepAngleDeg)) / (2 * Math.PI);
}
