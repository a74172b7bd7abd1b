/**
 * Least reference voltage, V, that a driver's comparator works well with; offsets and noise weigh more and more below it.
 * Source: TRINAMIC TMC2209 data sheet, which advises against less than about 0.5 to 1 V (from memory).
 */
export const LEAST_REFERENCE_VOLTAGE = 0.5;

/**
 * Current, A, of a driver that compares the sense voltage with a divided reference: I = Vref/(k·Rs).
 * Vref in V, k the divider of the comparator (no unit), Rs in Ω, both more than 0; peak or rms as the driver's data sheet says.
 * Source: the comparator's balance, Rs·I = Vref/k.
 */
export function referenceVoltageCurrent(input: {
  readonly referenceVoltage: number;
  readonly gain: number;
  readonly senseResistance: number;
}): number {
  return input.referenceVoltage / (input.gain * input.senseResistance);
}

/**
 * Current, A, of a driver without a sense resistor of its own: I = G·Vref, G in A/V, Vref in V.
 * Source: Toshiba TB67S279FTG data sheet (2017-09-15), p. 16.
 */
export function transconductanceCurrent(input: {
  readonly referenceVoltage: number;
  readonly amperesPerVolt: number;
}): number {
  return input.amperesPerVolt * input.referenceVoltage;
}

/**
 * Peak current, A, of a driver with a current scale: I_pk = s·(CS + 1)/N·V_FS/(Rs + R_int).
 * CS counts from 0 to N − 1, s is a share of 1, V_FS in V, resistances in Ω.
 * Source: TRINAMIC TMC2209 data sheet Rev. 1.03, ch. 8, and TMC5160 Rev. 1.14, ch. 9.
 */
export function digitalScaleCurrent(input: {
  readonly scale: number;
  readonly steps: number;
  readonly overallScale: number;
  readonly fullScaleVoltage: number;
  readonly senseResistance: number;
  readonly internalResistance: number;
}): number {
  const fullScale = input.fullScaleVoltage / (input.senseResistance + input.internalResistance);
  return ((input.overallScale * (input.scale + 1)) / input.steps) * fullScale;
}
