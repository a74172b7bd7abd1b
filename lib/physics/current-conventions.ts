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
