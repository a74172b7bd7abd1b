/** Temperature below zero at which the resistance of copper would vanish, K. Source: IEC 60034-1 gives 235, the trade 234.5. */
const COPPER = 234.5;
const COPPER_AT_20 = COPPER + 20;

/**
 * Resistance of copper at a temperature T (°C) over that at 20 °C, no unit: (234.5 + T)/254.5. Valid −60 to 250 °C.
 * Source: IEC 60034-1, resistance method, with the trade's 234.5 K in place of its 235.
 */
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

/**
 * Winding temperature by resistance, °C: (R2/R1)·(k + θ1) − k; R1 in Ω at θ1 (°C, motor as cold as the air), R2 in Ω hot.
 * k = 234.5 K for copper, the trade's and this project's value throughout; IEC 60034-1 prints 235, which gives at most
 * 0.2 K more up to 130 °C. It is the mean of the winding, 5 to 15 K below its hot spot.
 * Source: IEC 60034-1, resistance method (clause from memory: 8.6.2).
 */
export function windingTemperatureByResistance(input: {
  readonly cold: number;
  readonly coldAt: number;
  readonly hot: number;
}): number {
  return (input.hot / input.cold) * (COPPER + input.coldAt) - COPPER;
}

export const THERMAL_CLASSES = ["A", "E", "B", "F", "H"] as const;
export type ThermalClass = (typeof THERMAL_CLASSES)[number];

/** °C of the hot spot (IEC 60085), K of mean rise by resistance above 40 °C air (IEC 60034-1; A and E from memory). */
const CLASS_LIMITS: Readonly<Record<ThermalClass, { readonly hotSpot: number; readonly rise: number }>> = {
  A: { hotSpot: 105, rise: 60 },
  E: { hotSpot: 120, rise: 75 },
  B: { hotSpot: 130, rise: 80 },
  F: { hotSpot: 155, rise: 105 },
  H: { hotSpot: 180, rise: 125 },
};

/** Air, °C, that the rises of IEC 60034-1 are stated for. */
export const CLASS_AMBIENT = 40;

/**
 * Limits of a thermal class: hot spot in °C and mean winding rise in K over air of 40 °C. In cooler air the rise may
 * be greater, in warmer air it is less, so that 40 °C + rise is the limit of the mean temperature.
 * Source: IEC 60085 (A 105, E 120, B 130, F 155, H 180 °C); IEC 60034-1 (B 80, F 105, H 125 K; A 60, E 75 K from memory).
 */
export function thermalClassLimits(letter: ThermalClass): {
  readonly hotSpot: number;
  readonly rise: number;
} {
  return CLASS_LIMITS[letter];
}
