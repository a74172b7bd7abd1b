/**
 * Highest speed of a move from rest to rest, m/s: min(v, √(a·d)); v set speed m/s, a acceleration m/s², d travel m
 * (rad on a rotary axis). Source: kinematics of the trapezoid.
 */
export function peakSpeed(input: {
  readonly speed: number;
  readonly acceleration: number;
  readonly travel: number;
}): number {
  return Math.min(input.speed, Math.sqrt(input.acceleration * input.travel));
}

/** Travel, m, that a move from rest to rest needs to reach speed v (m/s) at acceleration a (m/s²): v²/a. Source: kinematics. */
export function travelToReach(speed: number, acceleration: number): number {
  return speed ** 2 / acceleration;
}
