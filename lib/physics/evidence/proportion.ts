import { betaQuantile } from "./distributions";

export interface ShareInterval {
  readonly low: number;
  readonly high: number;
}

/**
 * Wilson's interval of a share, shares of 1: k of n, at the normal deviate z (1.96: 95 % two-sided), n ≥ 1, 0 ≤ k ≤ n.
 * (p + z²/2n ± z·√(p(1−p)/n + z²/4n²))/(1 + z²/n). Source: Wilson, JASA 22 (1927) 209.
 */
export function wilsonInterval(k: number, n: number, z: number): ShareInterval {
  const p = k / n;
  const scale = 1 + z ** 2 / n;
  const centre = (p + z ** 2 / (2 * n)) / scale;
  const half = (z / scale) * Math.sqrt((p * (1 - p)) / n + z ** 2 / (4 * n ** 2));
  return { low: k === 0 ? 0 : centre - half, high: k === n ? 1 : centre + half };
}

/**
 * Exact interval of a share, shares of 1: k of n at a two-sided confidence (share of 1), n ≥ 1, 0 ≤ k ≤ n.
 * Source: Clopper & Pearson, Biometrika 26 (1934) 404, in its beta form.
 */
export function clopperPearson(k: number, n: number, confidence: number): ShareInterval {
  const tail = (1 - confidence) / 2;
  return {
    low: k === 0 ? 0 : betaQuantile(tail, k, n - k + 1),
    high: k === n ? 1 : betaQuantile(1 - tail, k + 1, n - k),
  };
}
