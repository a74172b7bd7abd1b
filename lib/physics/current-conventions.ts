import type { Basis } from "@/lib/domain/values";

/**
 * Peak of a sine-commutated phase current, A: I_pk = √2·I, I in A rms. Valid for microstepping, where the two
 * phases are a sine and a cosine. Source: definition of the rms value of a sine.
 */
export function peakFromRms(rms: number): number {
  return Math.SQRT2 * rms;
}

/** Rms of a sine-commutated phase current, A: I = I_pk/√2, I_pk in A. Source: as `peakFromRms`. */
export function rmsFromPeak(peak: number): number {
  return peak / Math.SQRT2;
}

/** A current, A, stated on a basis, as A rms. Source: as `peakFromRms`. */
export function toRms(value: number, basis: Basis): number {
  return basis === "peak" ? rmsFromPeak(value) : value;
}

/** A current in A rms as stated on a basis, A. Source: as `peakFromRms`. */
export function fromRms(rms: number, basis: Basis): number {
  return basis === "peak" ? peakFromRms(rms) : rms;
}

/** How the coils of a motor with half coils (six or eight leads) are wired to a bipolar driver. */
export type Connection = "half_coil" | "series" | "parallel";

/** Factors on a half coil's current, resistance and inductance; equal copper loss, inductance with the turns squared. */
const CONNECTIONS: Readonly<Record<Connection, { current: number; resistance: number; inductance: number }>> =
  {
    half_coil: { current: 1, resistance: 1, inductance: 1 },
    series: { current: Math.SQRT1_2, resistance: 2, inductance: 4 },
    parallel: { current: Math.SQRT2, resistance: 0.5, inductance: 1 },
  };

/**
 * Factors from the rating of one half coil (unipolar rating) to the winding as connected: rms current, resistance,
 * inductance, no units. Series 1/√2, 2, 4; parallel √2, 1/2, 1; half coil 1, 1, 1. The peak setting of a sine drive is
 * √2 times the current: 1.0, 2.0 and 1.4 times the unipolar rating. Source: Intelligent Motion Systems IM483 manual
 * pp. 36-37 and Anaheim Automation L010185 p. 9 (peak multipliers); turns squared for the inductance.
 */
export function connectionFactors(connection: Connection): {
  readonly current: number;
  readonly resistance: number;
  readonly inductance: number;
} {
  return CONNECTIONS[connection];
}
