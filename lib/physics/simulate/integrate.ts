/**
 * Places in the one array of numbers that a simulation works on; nothing is allocated while it runs. First the state:
 * current a and b (A), angle (rad) and speed (rad/s) of the rotor, the same of the load.
 */
export const CURRENT_A = 0;
export const CURRENT_B = 1;
export const ANGLE = 2;
export const SPEED = 3;
export const LOAD_ANGLE = 4;
export const LOAD_SPEED = 5;

/** Constants of the axis: Nr, I_pk, V/L, R/L, Ke/L, then torques, inertias, stiffness and damping in SI units. */
export const TEETH = 6;
export const PEAK_CURRENT = 7;
export const VOLTAGE_RATE = 8;
export const RESISTANCE_RATE = 9;
export const EMF_RATE = 10;
export const TORQUE_CONSTANT = 11;
export const DAMPING = 12;
export const STEADY = 13;
export const FRICTION = 14;
export const FRICTION_SPEED = 15;
export const DETENT = 16;
export const ROTOR_INERTIA = 17;
/** 0: rotor and load are one body, and the load's state is not used. */
export const LOAD_INERTIA = 18;
export const STIFFNESS = 19;
export const COUPLING_DAMPING = 20;

/** The stretch of the command: shaft angle (rad), speed, acceleration, jerk at its start, and when it starts (s). */
export const FROM_ANGLE = 21;
export const FROM_SPEED = 22;
export const FROM_ACCELERATION = 23;
export const FROM_JERK = 24;
export const FROM_TIME = 25;
/** s of one step, and steps done of the stretch. */
export const STEP = 26;
export const STEPS_DONE = 27;

/** Largest lag so far (electrical rad, no sign) and when (s); when it passed half a turn for good (−1: not yet). */
export const LARGEST_LAG = 28;
export const LARGEST_LAG_TIME = 29;
export const BROKE_TIME = 30;
/** s during which the supply could not drive the current that was asked for. */
export const SHORT_TIME = 31;

/** Steps between two samples, steps left to the next one, and samples taken. */
export const SAMPLE_EVERY = 32;
export const SAMPLE_IN = 33;
export const SAMPLES_TAKEN = 34;

export const MEMORY = 35;

/** Numbers of one sample: time (s), shaft speed commanded and real (rad/s), lag (electrical rad), current a and b (A). */
export const SAMPLE = 6;

/** Rate, 1/s, at which the driver closes the gap between wanted and present current as long as its supply allows. */
export const REGULATOR_RATE = 20_000;

/** Gap, as a share of the peak current, from which the supply counts as too low for the current that is asked for. */
const SHORT_SHARE = 0.05;

/** Number at a place that the constants above name; safe because the array is as long as `MEMORY` says. */
export function at(memory: Float64Array, place: number): number {
  return memory[place] as number;
}

/** Seconds from the start of the move to the present state. */
export function timeOf(memory: Float64Array): number {
  return at(memory, FROM_TIME) + at(memory, STEPS_DONE) * at(memory, STEP);
}

/** Angle of the rotor behind the command, electrical rad: 2π are four full steps. */
export function lagOf(memory: Float64Array): number {
  const commanded = commandedAngle(memory, at(memory, STEPS_DONE) * at(memory, STEP));
  return at(memory, TEETH) * (commanded - at(memory, ANGLE));
}

/** Angle of the shaft, rad, that the stretch commands `tau` seconds after its start. */
function commandedAngle(memory: Float64Array, tau: number): number {
  const bend = at(memory, FROM_ACCELERATION) / 2 + (tau * at(memory, FROM_JERK)) / 6;
  return at(memory, FROM_ANGLE) + tau * (at(memory, FROM_SPEED) + tau * bend);
}

/** Speed of the shaft, rad/s, that the stretch commands `tau` seconds after its start. */
function commandedSpeed(memory: Float64Array, tau: number): number {
  return at(memory, FROM_SPEED) + tau * (at(memory, FROM_ACCELERATION) + (tau * at(memory, FROM_JERK)) / 2);
}

/**
 * Takes a number of Runge-Kutta steps of fourth order within the present stretch of the command, and samples on the way
 * as far as `samples` has room.
 *
 * Phases: L·di/dt = v − R·i − e with e_a = −Ke·ω·sin Nr·θ, e_b = Ke·ω·cos Nr·θ. Wanted currents are I_pk·cos φ and
 * I_pk·sin φ, φ the commanded electrical angle. The chopper is taken as its mean over a period: it sets
 * v = R·i + e + L·(di_w/dt + k·(i_w − i)) clipped to ±V, i_w the wanted current, k = 20 000/s. Rotor:
 * J·dω/dt = Ke·(i_b·cos Nr·θ − i_a·sin Nr·θ) − T_d·sin 4·Nr·θ − c·(ω − ω_w) − load, ω_w the commanded speed, with the
 * friction T_f·ω/√(ω² + ω_s²) in place of a jump at standstill. A load
 * behind a compliance follows K·(θ − θ_l) + C·(ω − ω_l). SI units; inductance constant, no iron loss.
 * Source: Acarnley, Stepping Motors; Kenjo & Sugawara (phase equations).
 */
// eslint-disable-next-line max-lines-per-function -- all in local variables: kept in arrays, the loop takes twice as long
export function integrate(m: Float64Array, steps: number, samples: Float32Array): void {
  const teeth = at(m, TEETH);
  const peak = at(m, PEAK_CURRENT);
  const voltageRate = at(m, VOLTAGE_RATE);
  const resistanceRate = at(m, RESISTANCE_RATE);
  const emfRate = at(m, EMF_RATE);
  const torqueConstant = at(m, TORQUE_CONSTANT);
  const damping = at(m, DAMPING);
  const steady = at(m, STEADY);
  const friction = at(m, FRICTION);
  const frictionSquared = at(m, FRICTION_SPEED) ** 2;
  const detent = at(m, DETENT);
  const rotorInertia = at(m, ROTOR_INERTIA);
  const loadInertia = at(m, LOAD_INERTIA);
  const stiffness = at(m, STIFFNESS);
  const couplingDamping = at(m, COUPLING_DAMPING);
  const h = at(m, STEP);
  const half = h / 2;
  const third = h / 3;
  const sixth = h / 6;
  const gap = SHORT_SHARE * peak;
  const every = at(m, SAMPLE_EVERY);
  let sampleIn = at(m, SAMPLE_IN);
  let place = at(m, SAMPLES_TAKEN) * SAMPLE;
  let short = at(m, SHORT_TIME);
  let done = at(m, STEPS_DONE);
  let ia = at(m, CURRENT_A);
  let ib = at(m, CURRENT_B);
  let angle = at(m, ANGLE);
  let speed = at(m, SPEED);
  let loadAngle = at(m, LOAD_ANGLE);
  let loadSpeed = at(m, LOAD_SPEED);
  const fromAngle = at(m, FROM_ANGLE);
  const fromSpeed = at(m, FROM_SPEED);
  const halfAcceleration = at(m, FROM_ACCELERATION) / 2;
  const sixthJerk = at(m, FROM_JERK) / 6;
  const fromTime = at(m, FROM_TIME);
  let phase = teeth * commandedAngle(m, done * h);
  let wantedA = peak * Math.cos(phase);
  let wantedB = peak * Math.sin(phase);
  let wantedSpeed = commandedSpeed(m, done * h);
  for (let count = 0; count < steps; count += 1) {
    let tryA = ia;
    let tryB = ib;
    let tryAngle = angle;
    let trySpeed = speed;
    let tryLoadAngle = loadAngle;
    let tryLoadSpeed = loadSpeed;
    let sumA = 0;
    let sumB = 0;
    let sumAngle = 0;
    let sumSpeed = 0;
    let sumLoadAngle = 0;
    let sumLoadSpeed = 0;
    for (let stage = 0; stage < 4; stage += 1) {
      if (stage === 1 || stage === 3) {
        done += 0.5;
        const tau = done * h;
        phase = teeth * (fromAngle + tau * (fromSpeed + tau * (halfAcceleration + tau * sixthJerk)));
        wantedSpeed = fromSpeed + tau * (2 * halfAcceleration + 3 * tau * sixthJerk);
        const quarter = Math.floor(phase * TWO_OVER_PI + 0.5);
        const rest = phase - quarter * HALF_PI_HIGH - quarter * HALF_PI_LOW;
        const sineOfRest = sineNearZero(rest);
        const cosineOfRest = cosineNearZero(rest);
        wantedA = peak * turned(quarter + 1, sineOfRest, cosineOfRest);
        wantedB = peak * turned(quarter, sineOfRest, cosineOfRest);
      }
      const electrical = teeth * tryAngle;
      const quarter = Math.floor(electrical * TWO_OVER_PI + 0.5);
      const rest = electrical - quarter * HALF_PI_HIGH - quarter * HALF_PI_LOW;
      const sineOfRest = sineNearZero(rest);
      const cosineOfRest = cosineNearZero(rest);
      const s = turned(quarter, sineOfRest, cosineOfRest);
      const c = turned(quarter + 1, sineOfRest, cosineOfRest);
      const ownA = resistanceRate * tryA - emfRate * trySpeed * s;
      const ownB = resistanceRate * tryB + emfRate * trySpeed * c;
      const feed = teeth * wantedSpeed;
      const rateA = clipped(REGULATOR_RATE * (wantedA - tryA) - feed * wantedB + ownA, voltageRate) - ownA;
      const rateB = clipped(REGULATOR_RATE * (wantedB - tryB) + feed * wantedA + ownB, voltageRate) - ownB;
      let torque = torqueConstant * (tryB * c - tryA * s) - damping * (trySpeed - wantedSpeed);
      torque -= 4 * detent * s * c * (c * c - s * s);
      const rateAngle = trySpeed;
      let rateLoadAngle = 0;
      let rateLoadSpeed = 0;
      let rubbing = trySpeed;
      if (loadInertia > 0) rubbing = tryLoadSpeed;
      const resisting = steady + (friction * rubbing) / Math.sqrt(rubbing * rubbing + frictionSquared);
      if (loadInertia > 0) {
        const between = stiffness * (tryAngle - tryLoadAngle) + couplingDamping * (trySpeed - tryLoadSpeed);
        torque -= between;
        rateLoadAngle = tryLoadSpeed;
        rateLoadSpeed = (between - resisting) / loadInertia;
      } else torque -= resisting;
      const rateSpeed = torque / rotorInertia;
      const weight = stage === 0 || stage === 3 ? sixth : third;
      sumA += weight * rateA;
      sumB += weight * rateB;
      sumAngle += weight * rateAngle;
      sumSpeed += weight * rateSpeed;
      sumLoadAngle += weight * rateLoadAngle;
      sumLoadSpeed += weight * rateLoadSpeed;
      const reach = stage === 2 ? h : half;
      tryA = ia + reach * rateA;
      tryB = ib + reach * rateB;
      tryAngle = angle + reach * rateAngle;
      trySpeed = speed + reach * rateSpeed;
      tryLoadAngle = loadAngle + reach * rateLoadAngle;
      tryLoadSpeed = loadSpeed + reach * rateLoadSpeed;
    }
    ia += sumA;
    ib += sumB;
    angle += sumAngle;
    speed += sumSpeed;
    loadAngle += sumLoadAngle;
    loadSpeed += sumLoadSpeed;
    const lag = phase - teeth * angle;
    observe(m, Math.abs(lag), fromTime + done * h);
    if (Math.abs(wantedA - ia) + Math.abs(wantedB - ib) > gap) short += h;
    sampleIn -= 1;
    if (sampleIn <= 0 && place < samples.length) {
      samples[place] = fromTime + done * h;
      samples[place + 1] = wantedSpeed;
      samples[place + 2] = speed;
      samples[place + 3] = lag;
      samples[place + 4] = ia;
      samples[place + 5] = ib;
      place += SAMPLE;
      sampleIn = every;
    }
  }
  m[SAMPLE_IN] = sampleIn;
  m[SAMPLES_TAKEN] = place / SAMPLE;
  m[SHORT_TIME] = short;
  m[STEPS_DONE] = done;
  m[CURRENT_A] = ia;
  m[CURRENT_B] = ib;
  m[ANGLE] = angle;
  m[SPEED] = speed;
  m[LOAD_ANGLE] = loadAngle;
  m[LOAD_SPEED] = loadSpeed;
}

/** Keeps the largest lag, and when the lag left the turn that it belongs to without coming back. */
function observe(m: Float64Array, lag: number, time: number): void {
  const largest = at(m, LARGEST_LAG);
  if (lag > largest) {
    m[LARGEST_LAG] = lag;
    m[LARGEST_LAG_TIME] = time;
    if (lag > Math.PI && at(m, BROKE_TIME) < 0) m[BROKE_TIME] = time;
  } else if (lag < Math.PI / 2 && largest < 2 * Math.PI) m[BROKE_TIME] = -1;
}

function clipped(value: number, most: number): number {
  return value > most ? most : value < -most ? -most : value;
}

// Sine and cosine within 10⁻¹⁵ + 10⁻¹⁶·|x| for |x| < 10⁶ rad, by the Taylor series on ±π/4. With the built-in ones, which
// are calls and reduce their angle twice, the loop takes about half as long again.
const TWO_OVER_PI = 2 / Math.PI;
/** π/2 in two parts; the first has 33 bits, so that its multiples up to 2^20 are exact. */
const HALF_PI_HIGH = 1.57079632673412561417;
const HALF_PI_LOW = 6.07710050650619224932e-11;
const S3 = -1 / 6;
const S5 = 1 / 120;
const S7 = -1 / 5040;
const S9 = 1 / 362880;
const S11 = -1 / 39916800;
const S13 = 1 / 6227020800;
const S15 = -1 / 1307674368000;
const C2 = -1 / 2;
const C4 = 1 / 24;
const C6 = -1 / 720;
const C8 = 1 / 40320;
const C10 = -1 / 3628800;
const C12 = 1 / 479001600;
const C14 = -1 / 87178291200;
const C16 = 1 / 20922789888000;

function sineNearZero(r: number): number {
  const q = r * r;
  return r * (1 + q * (S3 + q * (S5 + q * (S7 + q * (S9 + q * (S11 + q * (S13 + q * S15)))))));
}

function cosineNearZero(r: number): number {
  const q = r * r;
  return 1 + q * (C2 + q * (C4 + q * (C6 + q * (C8 + q * (C10 + q * (C12 + q * (C14 + q * C16)))))));
}

/** Sine of a rest behind a number of quarter turns; one quarter more gives the cosine. */
function turned(quarter: number, sineOfRest: number, cosineOfRest: number): number {
  const value = (quarter & 1) !== 0 ? cosineOfRest : sineOfRest;
  return (quarter & 2) !== 0 ? -value : value;
}
