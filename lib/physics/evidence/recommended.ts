/**
 * The acceleration (m/s² or rad/s²) that leaves a torque margin m (share of 1) where steps are lost at a_f: of the
 * torque T_L + J·a_f/r that was just enough, T/(1+m) may be used, so a = (J·a_f/r − m·T_L)/(1+m)·r/J; 0 where the load
 * alone takes it up. T_L load torque in N·m and J inertia in kg·m² at each motor, r in m (rad) per rad. Without a load
 * (null) a_f/(1+m), which leaves less. Source: Newton's second law with the margin on torque.
 */
export function recommendedAcceleration(input: {
  readonly failing: number;
  readonly margin: number;
  readonly load: { readonly torque: number; readonly inertia: number; readonly radius: number } | null;
}): number {
  const { failing, margin, load } = input;
  if (load === null) return failing / (1 + margin);
  const perAcceleration = load.inertia / load.radius;
  return Math.max(0, (perAcceleration * failing - margin * load.torque) / (1 + margin) / perAcceleration);
}

/**
 * The current (A, either basis) that leaves a torque margin m where steps are lost at I_f: I_f·(1+m). Valid up to the
 * rated current. Source: torque in proportion to current below saturation.
 */
export function recommendedCurrent(failing: number, margin: number): number {
  return failing * (1 + margin);
}

/**
 * The speed jump (m/s or rad/s) that leaves a torque margin m where steps are lost at v_f: v_f/√(1+m). Source:
 * equal-area criterion, the jump goes with the root of the torque; load torque left out.
 */
export function recommendedJump(failing: number, margin: number): number {
  return failing / Math.sqrt(1 + margin);
}
