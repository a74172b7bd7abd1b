/** One settled temperature: what heated the motor, and how much warmer than the air it was. */
export interface SettledReading {
  /** Copper loss, W. */
  readonly power: number;
  /** K above the air. */
  readonly rise: number;
}

export interface FittedResistance {
  readonly ok: true;
  /** K/W, with its standard uncertainty and the ends of its 95 % interval. */
  readonly value: number;
  readonly uncertainty: number;
  readonly low: number;
  readonly high: number;
  /** Share of 1 that the readings have in the value; the catalog has the rest. */
  readonly weight: number;
}

export type ThermalFit =
  | FittedResistance
  | { readonly ok: false; readonly because: "too_few" | "contradictory" | "far_from_catalog" };

/**
 * Standard uncertainty of a catalog's thermal resistance, share of 1. A data sheet states it for a motor on its maker's
 * test plate; another mount moves it by tens of percent. Common practice, no source.
 */
export const CATALOG_SPREAD = 0.3;
/** K, standard: a contact probe (2 K) and the air thermometer (1 K). Common practice, no source. */
export const PROBE_UNCERTAINTY = Math.hypot(2, 1);
/** Share of 1, standard: a current within ±5 % is a loss within ±10 %, rectangular (JCGM 100:2008, 4.3.7). */
export const POWER_SPREAD = 0.1 / Math.sqrt(3);
/** One reading may have been taken before the motor had settled; two that agree seldom were. */
export const LEAST_SETTLED = 2;
/** K; below it a reading says more of the probe than of the motor. */
export const LEAST_RISE = 10;
/** Scatter over its expected size beyond which readings and catalog cannot all be true. */
const LARGEST_RATIO = 3;
/**
 * How far a fit may lead away from the catalog, in standard deviations of its spread. Farther off, the motor more likely
 * stood on another current or had not settled than that its mount is so different. Normal distribution, 95 %.
 */
export const FARTHEST_DEVIATIONS = 2;
/** Half the width of a 95 % interval in standard uncertainties, normal distribution. */
const NORMAL_95 = 1.96;

/**
 * Standard uncertainty of a measured rise ΔT, K: hypot(u_probe, s·ΔT), u_probe of probe and air thermometer in K, s the
 * share by which the loss is not known exactly. Valid for ΔT ≥ 0 K. Source: JCGM 100:2008, 5.1.2 (independent inputs).
 */
export function riseUncertainty(rise: number): number {
  return Math.hypot(PROBE_UNCERTAINTY, POWER_SPREAD * rise);
}

/**
 * Thermal resistance R, K/W, from settled temperatures by weighted least squares, the catalog value R0 as one more
 * observation: R = (R0/u0² + Σ P·ΔT/σ²)/(1/u0² + Σ P²/σ²), u² = 1/(1/u0² + Σ P²/σ²), u0 = 0.3·R0, σ of each rise by
 * `riseUncertainty`. Where readings and catalog scatter more than their uncertainties say, u grows by the Birge ratio
 * √(χ²/n). Rises below 10 K are left out; fewer than two readings, a Birge ratio above 3, or an R
 * more than 2·u0 away from R0 are refused.
 * Valid for R0 > 0 and P > 0. Source: weighted least squares with a prior; Birge ratio as in the adjustment of physical
 * constants (both from memory).
 */
export function fitThermalResistance(catalog: number, readings: readonly SettledReading[]): ThermalFit {
  const used = readings.filter(isUsable);
  if (used.length < LEAST_SETTLED) return { ok: false, because: "too_few" };
  const prior = 1 / (CATALOG_SPREAD * catalog) ** 2;
  let weights = 0;
  let weighted = 0;
  for (const { power, rise } of used) {
    const variance = riseUncertainty(rise) ** 2;
    weights += power ** 2 / variance;
    weighted += (power * rise) / variance;
  }
  const value = (prior * catalog + weighted) / (prior + weights);
  const ratio = birgeRatio({ catalog, value, readings: used });
  if (ratio > LARGEST_RATIO) return { ok: false, because: "contradictory" };
  if (Math.abs(value - catalog) > FARTHEST_DEVIATIONS * CATALOG_SPREAD * catalog)
    return { ok: false, because: "far_from_catalog" };
  const uncertainty = Math.max(1, ratio) / Math.sqrt(prior + weights);
  return {
    ok: true,
    value,
    uncertainty,
    low: Math.max(0, value - NORMAL_95 * uncertainty),
    high: value + NORMAL_95 * uncertainty,
    weight: weights / (prior + weights),
  };
}

/**
 * Whether a reading is warm enough to say something of the motor: P > 0 W and a rise of 10 K or more, where probe and
 * air thermometer together (2.2 K) are still less than a quarter of it. Source: common practice, no source.
 */
export function isUsable({ power, rise }: SettledReading): boolean {
  return power > 0 && rise >= LEAST_RISE;
}

interface Scatter {
  readonly catalog: number;
  readonly value: number;
  readonly readings: readonly SettledReading[];
}

/** √(χ²/n), n readings and a catalog value less the one constant that was fitted. */
function birgeRatio({ catalog, value, readings }: Scatter): number {
  const ofCatalog = ((catalog - value) / (CATALOG_SPREAD * catalog)) ** 2;
  const squares = readings.map(({ power, rise }) => ((rise - value * power) / riseUncertainty(rise)) ** 2);
  return Math.sqrt((ofCatalog + squares.reduce((sum, one) => sum + one, 0)) / readings.length);
}
