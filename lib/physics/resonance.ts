/**
 * Natural frequency, Hz, of a rotor in its magnetic spring: √(k/J)/2π; stiffness k in N·m/rad, inertia J in kg·m².
 * Source: harmonic oscillator.
 */
export function naturalFrequency(stiffness: number, inertia: number): number {
  return Math.sqrt(stiffness / inertia) / (2 * Math.PI);
}

/**
 * Stiffness of a stepping motor about a step, N·m/rad: Nr·T, T the holding torque at its present current, N·m.
 * Source: slope of T·sin(Nr·θ) at rest; Acarnley, Stepping Motors.
 */
export function magneticStiffness(holdingTorque: number, rotorTeeth: number): number {
  return rotorTeeth * holdingTorque;
}

/**
 * Least stiffness, N/m, of a closed belt between its pulleys: c·b·(1/L1 + 1/L2) of the two spans in parallel, least
 * where they are equal, 4·c·b/L. c in N for unit strain and mm of width (N/mm), b in mm, L = L1 + L2 in m.
 * Belts stiffen with tension; a data sheet's c is of the tensioned belt.
 * Source: form of Gates Mectrol, Timing Belt Theory (its constant from memory); two springs in parallel.
 */
export function leastBeltStiffness(input: {
  readonly specific: number;
  readonly width: number;
  readonly length: number;
}): number {
  const half = input.length / 2;
  return beltStiffness({ specific: input.specific, width: input.width, spans: [half, half] });
}

/** Stiffness, N/m, of a belt's two spans (m) in parallel. Symbols and source: `leastBeltStiffness`. */
export function beltStiffness(input: {
  readonly specific: number;
  readonly width: number;
  readonly spans: readonly number[];
}): number {
  return input.spans.reduce((sum, span) => sum + (input.specific * input.width) / span, 0);
}
