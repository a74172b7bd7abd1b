/** Coefficients of the Lanczos approximation with g = 7. Source: Lanczos, SIAM J. Numer. Anal. B 1 (1964) 86; from memory. */
const LANCZOS_FIRST = 0.99999999999980993;
const LANCZOS: readonly number[] = [
  676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059, 12.507343278686905,
  -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
];

/** ln Γ(x), no unit, for x > 0; within 1e-13. Source: Lanczos (1964). */
function logGamma(x: number): number {
  const y = x - 1;
  const sum = LANCZOS.reduce(
    (total, coefficient, index) => total + coefficient / (y + index + 1),
    LANCZOS_FIRST,
  );
  const t = y + 7.5;
  return 0.5 * Math.log(2 * Math.PI) + (y + 0.5) * Math.log(t) - t + Math.log(sum);
}

const TINY = 1e-300;
const notZero = (value: number): number => (Math.abs(value) < TINY ? TINY : value);

/** The continued fraction of the incomplete beta function by Lentz's method. Source: NIST DLMF 8.17.22. */
function betaFraction(a: number, b: number, x: number): number {
  let c = 1;
  let d = 1 / notZero(1 - ((a + b) * x) / (a + 1));
  let sum = d;
  for (let m = 1; m <= 10_000; m += 1) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / notZero(1 + even * d);
    c = notZero(1 + even / c);
    sum *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / notZero(1 + odd * d);
    c = notZero(1 + odd / c);
    sum *= d * c;
    if (Math.abs(d * c - 1) < 1e-16) break;
  }
  return sum;
}

/** Share of a beta distribution up to x, I_x(a, b), no unit; a and b > 0, x from 0 to 1. Source: NIST DLMF 8.17. */
export function betaShare(x: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x));
  if (x < (a + 1) / (a + b + 2)) return (front * betaFraction(a, b, x)) / a;
  return 1 - (front * betaFraction(b, a, 1 - x)) / b;
}

/** The x at which I_x(a, b) is `share` (0 to 1), no unit; by halving, to the last digits. Source: NIST DLMF 8.17. */
export function betaQuantile(share: number, a: number, b: number): number {
  let [low, high] = [0, 1];
  for (let halving = 0; halving < 200 && high - low > Number.EPSILON * high; halving += 1) {
    const middle = (low + high) / 2;
    if (betaShare(middle, a, b) < share) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/**
 * Chance, share of 1, of at most `failures` failures in `trials` independent trials that fail with chance `failing`.
 * Source: binomial distribution as a beta share, NIST DLMF 8.17.5.
 */
export function binomialShare(failures: number, trials: number, failing: number): number {
  return failures >= trials ? 1 : 1 - betaShare(failing, failures + 1, trials - failures);
}

/**
 * The normal deviate below which a share of 1 lies, no unit; 0 < share < 1, within 1e-9.
 * Source: Abramowitz & Stegun 26.2.23 as start (from memory), then Newton's method on `normalShare`.
 */
export function normalQuantile(share: number): number {
  if (share > 0.5) return -normalQuantile(1 - share);
  const t = Math.sqrt(-2 * Math.log(share));
  let z =
    (2.515517 + t * (0.802853 + t * 0.010328)) / (1 + t * (1.432788 + t * (0.189269 + t * 0.001308))) - t;
  for (let step = 0; step < 4; step += 1) z -= (normalShare(z) - share) / normalDensity(z);
  return z;
}

function normalDensity(z: number): number {
  return Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI);
}

/**
 * Share of a standard normal distribution below z, share of 1. Series within |z| ≤ 4 and the continued fraction beyond.
 * Source: Abramowitz & Stegun 26.2.11 and 26.2.14.
 */
export function normalShare(z: number): number {
  if (z < -4) return tailShare(-z);
  if (z > 4) return 1 - tailShare(z);
  let term = z;
  let sum = z;
  for (let k = 3; Math.abs(term) > 1e-17 * Math.abs(sum); k += 2) {
    term *= (z * z) / k;
    sum += term;
  }
  return 0.5 + normalDensity(z) * sum;
}

function tailShare(z: number): number {
  let fraction = z;
  for (let k = 60; k >= 1; k -= 1) fraction = z + k / fraction;
  return normalDensity(z) / fraction;
}
