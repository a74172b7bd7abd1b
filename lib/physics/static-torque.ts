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
