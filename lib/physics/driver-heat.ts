/** Growth of the on-resistance with junction temperature, 1/K. Source: TRINAMIC TMC2300 data sheet p. 13 (+50 % for +100 K). */
export const ON_RESISTANCE_GROWTH = 0.005;

/**
 * Conduction loss of one driver, W: 2·I²·R_on, two bridges, I in A rms, R_on in Ω (high side + low side of one
 * bridge, at its present temperature). Source: Toshiba TB67S279/289/249FTG application note (2018-03-07), sec. 12.
 */
export function conductionLoss(input: { readonly current: number; readonly onResistance: number }): number {
  return 2 * input.current ** 2 * input.onResistance;
}

/**
 * Switching loss of one driver, W: 2·V·(2/π)·I_pk·t·f, V in V, I_pk in A, edge t in s, chopping frequency f in Hz.
 * (2/π)·I_pk is the mean of the rectified sine. Source: overlap of voltage and current at each edge (textbook form).
 */
export function switchingLoss(input: {
  readonly voltage: number;
  readonly peakCurrent: number;
  readonly edge: number;
  readonly frequency: number;
}): number {
  return 2 * input.voltage * (2 / Math.PI) * input.peakCurrent * input.edge * input.frequency;
}

/**
 * Steady state of one driver: junction Tj, °C, and loss P, W, with
 * P = P0·(1 + α·(Tj − T0)) + P1 and Tj = Ta + R_th·P; α = 0.005/K.
 * `conduction` is P0 at `conductionAt` T0 (°C), `constant` P1 (W), `thermalResistance` in K/W, `ambient` in °C.
 * Null where R_th·P0·α ≥ 1: the junction never settles (runaway). Source: solved for Tj; growth as above.
 */
export function driverSteadyState(input: {
  readonly conduction: number;
  readonly conductionAt: number;
  readonly constant: number;
  readonly thermalResistance: number;
  readonly ambient: number;
}): { readonly junction: number; readonly power: number } | null {
  const { conduction, conductionAt, constant, thermalResistance, ambient } = input;
  const loop = 1 - thermalResistance * conduction * ON_RESISTANCE_GROWTH;
  if (loop <= 0) return null;
  const atZero = conduction * (1 - ON_RESISTANCE_GROWTH * conductionAt) + constant;
  const junction = (ambient + thermalResistance * atZero) / loop;
  const power = conduction * (1 + ON_RESISTANCE_GROWTH * (junction - conductionAt)) + constant;
  return { junction, power };
}

/**
 * Highest current of one driver, A rms, at which its junction settles at Tj (°C) in air of Ta (°C):
 * 2·R_on·(1 + α·(Tj − T0))·I² + s·I + P_q = (Tj − Ta)/R_th. R_on in Ω at T0 (°C), s the switching loss of 1 A rms (W/A),
 * P_q in W, R_th in K/W. 0 where the air alone, or the loss without current, is too much.
 * Source: `driverSteadyState` solved for the current.
 */
export function highestDriverCurrent(input: {
  readonly onResistance: number;
  readonly onResistanceAt: number;
  readonly switchingPerAmpere: number;
  readonly quiescent: number;
  readonly thermalResistance: number;
  readonly ambient: number;
  readonly junction: number;
}): number {
  const spare = (input.junction - input.ambient) / input.thermalResistance - input.quiescent;
  const growth = 1 + ON_RESISTANCE_GROWTH * (input.junction - input.onResistanceAt);
  const a = 2 * input.onResistance * growth;
  const s = input.switchingPerAmpere;
  if (spare <= 0 || a <= 0) return 0;
  // 2·c/(b + √…) instead of (−b + √…)/2a: no cancellation where switching dominates.
  return (2 * spare) / (s + Math.sqrt(s ** 2 + 4 * a * spare));
}
