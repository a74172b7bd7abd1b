/** Temperature below zero at which the resistance of copper would vanish, K. Source: IEC 60034-1 gives 235, the trade 234.5. */
const COPPER = 234.5;
const COPPER_AT_20 = COPPER + 20;

/** Resistance of copper at a temperature (°C) over that at 20 °C, no unit: (234.5 + T)/254.5. Valid −60 to 250 °C. */
export function copperFactor(temperatureC: number): number {
  return (COPPER + temperatureC) / COPPER_AT_20;
}

/**
 * Copper loss of a two-phase motor, W: 2·I²·R20·(234.5 + T)/254.5, I in A rms, R20 in Ω at 20 °C, T in °C.
 * Iron loss, which a turning motor adds, is not in it. Source: Joule's law for two phases.
 */
export function windingPower(input: {
  readonly current: number;
  readonly resistanceAt20: number;
  readonly temperature: number;
}): number {
  return 2 * input.current ** 2 * input.resistanceAt20 * copperFactor(input.temperature);
}

/**
 * Steady state of a motor at standstill: winding T, °C, and copper loss, W, with T = Ta + R_th·P(T).
 * R_th in K/W from winding to ambient, Ta in °C. Null where the loss grows faster than the heat leaves
 * (R_th·2·I²·R20 ≥ 254.5 K). Source: `windingPower` solved for T.
 */
export function windingSteadyState(input: {
  readonly current: number;
  readonly resistanceAt20: number;
  readonly thermalResistance: number;
  readonly ambient: number;
}): { readonly temperature: number; readonly power: number } | null {
  const { current, resistanceAt20, thermalResistance, ambient } = input;
  const rise = thermalResistance * 2 * current ** 2 * resistanceAt20;
  const loop = 1 - rise / COPPER_AT_20;
  if (loop <= 0) return null;
  const temperature = (ambient + (rise * COPPER) / COPPER_AT_20) / loop;
  return { temperature, power: windingPower({ current, resistanceAt20, temperature }) };
}
