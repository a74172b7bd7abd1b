/**
 * Highest speed of a move from rest to rest, m/s: min(v, √(a·d)); v set speed m/s, a acceleration m/s², d travel m
 * (rad on a rotary axis). Source: kinematics of the trapezoid.
 */
export function peakSpeed(input: {
  readonly speed: number;
  readonly acceleration: number;
  readonly travel: number;
}): number {
  return Math.min(input.speed, Math.sqrt(input.acceleration * input.travel));
}

/** Travel, m, that a move from rest to rest needs to reach speed v (m/s) at acceleration a (m/s²): v²/a. Source: kinematics. */
export function travelToReach(speed: number, acceleration: number): number {
  return speed ** 2 / acceleration;
}

/** The phases of a move from rest to rest. */
export interface MoveTimes {
  /** s from rest to the peak speed; stopping takes as long. */
  readonly accelerating: number;
  /** s at the peak speed. */
  readonly cruising: number;
  readonly total: number;
}

/**
 * Times of a trapezoid move from rest to rest, s: v_p/a each way and d/v_p − v_p/a between, v_p as `peakSpeed`.
 * d in m, v in m/s, a in m/s², all more than 0. Source: kinematics.
 */
export function trapezoidTimes(input: {
  readonly speed: number;
  readonly acceleration: number;
  readonly travel: number;
}): MoveTimes {
  const peak = peakSpeed(input);
  const accelerating = peak / input.acceleration;
  const cruising = Math.max(0, input.travel / peak - accelerating);
  return { accelerating, cruising, total: 2 * accelerating + cruising };
}

/**
 * Time, s, from rest to speed v with limited jerk: v/a + a/j where v ≥ a²/j, else 2·√(v/j).
 * v in m/s, a in m/s², j in m/s³. The way is v·t/2. Source: kinematics of the S-curve.
 */
export function jerkRampTime(input: {
  readonly speed: number;
  readonly acceleration: number;
  readonly jerk: number;
}): number {
  const { speed, acceleration, jerk } = input;
  return speed >= acceleration ** 2 / jerk
    ? speed / acceleration + acceleration / jerk
    : 2 * Math.sqrt(speed / jerk);
}

/**
 * Highest speed of a move from rest to rest with limited jerk, m/s: the v with v·t(v) = d, at most the set speed.
 * Symbols as `jerkRampTime`, d in m; 0 where a is 0. Source: kinematics; v·(v/a + a/j) = d, or 2·v·√(v/j) = d for
 * short moves.
 */
export function jerkPeakSpeed(input: {
  readonly speed: number;
  readonly acceleration: number;
  readonly jerk: number;
  readonly travel: number;
}): number {
  const { speed, acceleration: a, jerk, travel } = input;
  if (a === 0) return 0;
  const short = Math.cbrt((jerk * travel ** 2) / 4);
  if (short <= a ** 2 / jerk) return Math.min(speed, short);
  const b = a ** 2 / jerk;
  // The root of v² + b·v − a·d = 0, without the cancellation of (−b + √…)/2.
  return Math.min(speed, (2 * a * travel) / (b + Math.sqrt(b ** 2 + 4 * a * travel)));
}

/** Times of a move from rest to rest with limited jerk, s. Symbols and source: `jerkPeakSpeed`. */
export function jerkTimes(input: {
  readonly speed: number;
  readonly acceleration: number;
  readonly jerk: number;
  readonly travel: number;
}): MoveTimes {
  const peak = jerkPeakSpeed(input);
  const accelerating = jerkRampTime({ ...input, speed: peak });
  const cruising = Math.max(0, input.travel / peak - accelerating);
  return { accelerating, cruising, total: 2 * accelerating + cruising };
}

/**
 * Acceleration, m/s², at the moment when a jerk-limited ramp from rest to v_p passes the speed v:
 * min(a, √(2·j·v), √(2·j·(v_p − v))), 0 ≤ v ≤ v_p in m/s, a in m/s², j in m/s³. Source: kinematics of the S-curve.
 */
export function jerkRampAcceleration(input: {
  readonly speed: number;
  readonly peak: number;
  readonly acceleration: number;
  readonly jerk: number;
}): number {
  const { speed, peak, acceleration, jerk } = input;
  const rising = Math.sqrt(2 * jerk * Math.max(0, speed));
  const falling = Math.sqrt(2 * jerk * Math.max(0, peak - speed));
  return Math.min(acceleration, rising, falling);
}

/**
 * Travel, m, that a move from rest to rest with limited jerk needs to reach speed v: v·t(v), t as `jerkRampTime`, whose
 * symbols and units hold; a and j more than 0. Source: kinematics, each ramp of the S-curve takes v·t/2.
 */
export function jerkTravelToReach(input: {
  readonly speed: number;
  readonly acceleration: number;
  readonly jerk: number;
}): number {
  return input.speed * jerkRampTime(input);
}

/** Way, m, from a speed v (m/s) to rest at the deceleration a (m/s²): v²/2a. Source: kinematics. */
export function stoppingDistance(speed: number, acceleration: number): number {
  return speed ** 2 / (2 * acceleration);
}

/**
 * Way, m, from a speed v to rest with limited jerk: v·t(v)/2, t as `jerkRampTime`, whose symbols and units hold; never
 * less than v²/2a. Source: kinematics, the speed of the S-curve falls evenly about its half.
 */
export function jerkStoppingDistance(input: {
  readonly speed: number;
  readonly acceleration: number;
  readonly jerk: number;
}): number {
  return (input.speed * jerkRampTime(input)) / 2;
}
