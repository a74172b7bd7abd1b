/**
 * Quantities of one axis reckoned by another road than lib/physics: heat by iteration, the voltage-limit speed by
 * bisection, the pull-out by scanning the currents that the supply allows, the start-stop speed by adding up the work
 * of the magnetic spring. Symbols as in the trade; SI units throughout.
 */
export interface Case {
  /** A rms, run and hold. */
  readonly run: number;
  readonly hold: number;
  /** A rms. */
  readonly rated: number;
  /** Winding at 20 °C, Ω; H; N·m; kg·m²; deg. */
  readonly R: number;
  readonly L: number;
  readonly Th: number;
  readonly rotor: number;
  readonly stepAngle: number;
  readonly windingLimit: number;
  readonly toAmbient: number;
  readonly caseToAmbient: number;
  readonly motorAmbient: number;
  /** Driver: Ω, °C, K/W, W, s, Hz. */
  readonly rdsOn: number;
  readonly rdsOnAt: number;
  readonly junction: number;
  readonly quiescent: number;
  readonly edge: number;
  readonly chopping: number;
  readonly onTime: number;
  readonly driverAmbient: number;
  readonly sense: number;
  /** V, share, F. */
  readonly V: number;
  readonly tolerance: number;
  readonly C: number;
  /** m (or rad) for one radian of the motor. */
  readonly r: number;
  readonly eta: number;
  readonly shaftExtra: number;
  readonly n: number;
  /** kg (kg·m² rotary), N (N·m). */
  readonly m: number;
  readonly friction: number;
  readonly external: number;
  readonly W: number;
  readonly travel: number;
  readonly v: number;
  readonly a: number;
  readonly microsteps: number;
  /** Steps for one metre (radian). */
  readonly stepsPerUnit: number;
}

/** Solves x = f(x) by going round until nothing moves. */
function settle(f: (x: number) => number, start: number): number {
  let x = start;
  for (let round = 0; round < 10_000; round++) {
    const next = f(x);
    if (Math.abs(next - x) < 1e-13 * Math.max(1, Math.abs(x))) return next;
    x = next;
  }
  throw new Error("does not settle");
}

export function byHand(c: Case) {
  const peak = Math.sqrt(2) * c.run;
  const Nr = 360 / c.stepAngle / 4;
  const copper = (T: number) => (234.5 + T) / 254.5;
  const heat = (T: number) => 2 * c.run * c.run * c.R * copper(T);
  const winding = settle((T) => c.motorAmbient + c.toAmbient * heat(T), c.motorAmbient);
  const driverLoss = (T: number) =>
    2 * c.run ** 2 * c.rdsOn * (1 + 0.005 * (T - c.rdsOnAt)) +
    c.quiescent +
    2 * c.V * (2 / Math.PI) * peak * c.edge * c.chopping;
  const junction = settle((T) => c.driverAmbient + c.junction * driverLoss(T), c.driverAmbient);
  const peakSpeed = Math.min(c.v, Math.sqrt(c.a * c.travel));
  const used = Math.min(c.run, c.rated);
  const R = c.R * copper(Math.min(winding, c.windingLimit)) + c.rdsOn + c.sense;
  const Ke = c.Th / (Math.sqrt(2) * c.rated);
  const limit = voltageLimit({ R, L: c.L, Ke, Nr, V: c.V, I: Math.sqrt(2) * used });
  const pullOut = (w: number) => scannedPullOut({ R, L: c.L, Ke, Nr, V: c.V, I: Math.sqrt(2) * used }, w);
  const F = c.friction + Math.abs(c.external + c.W);
  const loadTorque = ((F / c.n) * c.r) / c.eta;
  const Jm = c.rotor + c.shaftExtra;
  const required = loadTorque + ((Jm + (c.m * c.r ** 2) / (c.n * c.eta)) * c.a) / c.r;
  const available = pullOut(peakSpeed / c.r);
  const J = Jm + (c.m * c.r ** 2) / c.n;
  const holdingAt = (I: number) => c.Th * Math.min(I / c.rated, 1);
  return {
    winding_current_rms: c.run,
    hold_current_rms: c.hold,
    sense_resistor_power: peak ** 2 * c.sense,
    driver_power: driverLoss(junction),
    driver_junction_c: junction,
    winding_c: winding,
    case_c: c.motorAmbient + c.caseToAmbient * heat(winding),
    step_rate: c.v * c.stepsPerUnit,
    peak_speed: peakSpeed,
    voltage_limit_speed: limit * c.r,
    torque_available: available,
    torque_required: required,
    torque_margin: available / required - 1,
    start_stop_speed: startStop({ torque: holdingAt(c.run), loadTorque, J, Nr, limit, pullOut }) * c.r,
    resonance_hz: Math.sqrt((Nr * holdingAt(c.run)) / J) / (2 * Math.PI),
    full_step_rate: ((peakSpeed / c.r) * 4 * Nr) / (2 * Math.PI),
    minimum_current_peak: (c.onTime * c.chopping * c.V) / c.R,
    hold_torque_margin: c.W === 0 ? undefined : holdingAt(c.hold) / ((Math.abs(c.W) / c.n) * c.r) - 1,
    bus_voltage_after_braking: Math.sqrt(
      (c.V * (1 + c.tolerance)) ** 2 +
        (2 * (0.5 * c.m * peakSpeed ** 2 + 0.5 * c.n * Jm * (peakSpeed / c.r) ** 2)) / c.C,
    ),
  };
}

interface Phase {
  readonly R: number;
  readonly L: number;
  readonly Ke: number;
  readonly Nr: number;
  readonly V: number;
  readonly I: number;
}

/** Voltage that a current (along the torque axis, along the field axis) asks for at a speed. */
function voltage({ R, L, Ke, Nr }: Phase, w: number, along: number, across: number): number {
  const X = Nr * w * L;
  return Math.hypot(R * along + X * across + Ke * w, R * across - X * along);
}

function voltageLimit(phase: Phase): number {
  if (voltage(phase, 0, phase.I, 0) >= phase.V) return 0;
  let [low, high] = [0, 1e6];
  for (let round = 0; round < 200; round++) {
    const middle = (low + high) / 2;
    if (voltage(phase, middle, phase.I, 0) < phase.V) low = middle;
    else high = middle;
  }
  return low;
}

/** The greatest torque of any current within both limits: best field current for each torque current, by bisection. */
function scannedPullOut(phase: Phase, w: number): number {
  const reachable = (along: number) => {
    const span = Math.sqrt(Math.max(0, phase.I ** 2 - along ** 2));
    let [low, high] = [-span, span];
    // The voltage is convex in the field current: ternary search for its least value.
    for (let round = 0; round < 200; round++) {
      const [one, other] = [low + (high - low) / 3, high - (high - low) / 3];
      if (voltage(phase, w, along, one) < voltage(phase, w, along, other)) high = other;
      else low = one;
    }
    return voltage(phase, w, along, (low + high) / 2) <= phase.V * (1 + 1e-12);
  };
  if (reachable(phase.I)) return phase.Ke * phase.I;
  if (!reachable(0)) return 0;
  let [low, high] = [0, phase.I];
  for (let round = 0; round < 200; round++) {
    const middle = (low + high) / 2;
    if (reachable(middle)) low = middle;
    else high = middle;
  }
  return phase.Ke * low;
}

interface Jump {
  readonly torque: number;
  readonly loadTorque: number;
  readonly J: number;
  readonly Nr: number;
  readonly limit: number;
  readonly pullOut: (w: number) => number;
}

/** Half of the jump whose kinetic energy the magnetic spring can take up before the rotor falls over its crest. */
function startStop({ torque, loadTorque, J, Nr, limit, pullOut }: Jump): number {
  const half = (T: number) => {
    if (loadTorque >= T) return 0;
    const rest = Math.asin(loadTorque / T) / Nr;
    const crest = Math.PI / Nr - rest;
    const steps = 20_000;
    let work = 0;
    for (let step = 0; step < steps; step++) {
      const angle = rest + ((step + 0.5) * (crest - rest)) / steps;
      work += ((T * Math.sin(Nr * angle) - loadTorque) * (crest - rest)) / steps;
    }
    return 0.5 * Math.sqrt((2 * work) / J);
  };
  const first = half(torque);
  return first > limit ? half(pullOut(first)) : first;
}
