/**
 * Holding torque at a current, N·m: Th·min(I/I_r, 1); I and I_r in A rms, Th at I_r. In proportion below the rated
 * current; above it the iron saturates and nothing is added. Source: Acarnley, Stepping Motors, ch. 2-3.
 */
export function holdingTorqueAt(input: {
  readonly holdingTorque: number;
  readonly current: number;
  readonly ratedCurrent: number;
}): number {
  return input.holdingTorque * Math.min(input.current / input.ratedCurrent, 1);
}

/**
 * Angle, rad of the shaft, by which a static load torque pulls the rotor away from its position: asin(T_L/T)/Nr.
 * T_L and T in N·m, Nr rotor teeth; one full step (π/2Nr) at T_L = T. Null beyond it: no position of rest is left.
 * Source: T·sin(Nr·θ), Acarnley, Stepping Motors, ch. 2-3 (from memory); Kenjo & Sugawara.
 */
export function positionError(input: {
  readonly load: number;
  readonly holdingTorque: number;
  readonly rotorTeeth: number;
}): number | null {
  const share = input.load / input.holdingTorque;
  return share >= 0 && share <= 1 ? Math.asin(share) / input.rotorTeeth : null;
}

/**
 * Largest load torque that may arrive at once, as a share of the holding torque: the root s of
 * 1 + √(1 − s²) = s·(π − asin s), 0.7246; a slower load may reach 1. It is also why acceleration, which begins as a
 * step, needs at least 1/s = 1.38 times its torque. Source: equal-area criterion (derived), no damping.
 */
export const SUDDEN_LOAD_SHARE = suddenLoadShare();

function suddenLoadShare(): number {
  let [low, high] = [0, 1];
  for (let round = 0; round < 60; round++) {
    const s = (low + high) / 2;
    if (1 + Math.sqrt(1 - s ** 2) > s * (Math.PI - Math.asin(s))) low = s;
    else high = s;
  }
  return low;
}
