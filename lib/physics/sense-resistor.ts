/**
 * Heat of one sense resistor, W, at standstill on a position of full current: I_pk²·Rs, I_pk in A, Rs in Ω.
 * The worst case; a running motor heats it less. Source: TRINAMIC TMC5160 data sheet Rev. 1.14, p. 75.
 */
export function senseResistorPower(input: {
  readonly peakCurrent: number;
  readonly resistance: number;
}): number {
  return input.peakCurrent ** 2 * input.resistance;
}
