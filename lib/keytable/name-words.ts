import type { ParameterName } from "@/lib/domain/parameters";

/**
 * Words of key names and what they say. The vocabulary is that of motion engineers and firmware texts
 * (common practice, no source). A word may say several things at once: `irun` is a run current.
 */
const WORDS: Record<string, string> = {
  run: "run running move moving motion drive driving work working",
  hold: "hold holding idle standby standstill rest sleep",
  current: "current curr cur amps amp ampere amperes amperage ma milliamps milliamp",
  "run current": "irun",
  "hold current": "ihold",
  rms: "rms",
  peak: "peak pk",
  reference: "ref reference",
  voltage: "voltage volt volts mv millivolts",
  "reference voltage": "vref",
  scale: "scale",
  "current scale": "cs",
  sense: "sense shunt",
  resistance: "resistance resistor ohm ohms mohm milliohm",
  "sense resistance": "rsense rs",
  microsteps:
    "microsteps microstep microstepping usteps ustep ustepping mstep msteps subdivide subdivision subdiv subdivisions mres",
  micro: "micro",
  steps: "steps step stp",
  pulse: "pulse pulses",
  per: "per",
  distance: "mm millimeter millimetre unit units",
  angle: "deg degree degrees",
  max: "max maximum maximal top highest upper hi",
  min: "min minimum minimal lowest lower lo",
  speed: "speed velocity vel feedrate feed",
  "max speed": "vmax",
  acceleration: "acceleration accel acc accelerate amax",
  jerk: "jerk",
  corner: "corner cornering junction jct scv",
  deviation: "deviation dev tolerance tol",
  travel: "travel position pos range stroke soft softlimit limit limits endstop stop length envelope",
  home: "home homing seek search datum zero",
  width: "width duration high len",
  direction: "dir direction",
  setup: "setup",
  invert: "invert inverted reverse reversed reversal flip flipped",
  interpolation: "interpolate interpolation interpol intpol interpolated",
  delay: "delay timeout wait time",
  supply: "supply bus psu vm vbus vmot vin",
  rate: "rate frequency freq hz khz",
};

/** Words that say nothing of the parameter. */
const NEUTRAL = new Set(
  "axis axes stepper steppers motor motors driver drivers default config settings setting value of the in an s".split(
    " ",
  ),
);

export const CONCEPTS: ReadonlyMap<string, readonly string[]> = new Map(
  Object.entries(WORDS).flatMap(([concepts, words]) =>
    words.split(" ").map((word): [string, readonly string[]] => [word, concepts.split(" ")]),
  ),
);

/** A number counts nothing either. */
export function isNeutral(word: string): boolean {
  const first = word.charCodeAt(0);
  return (first >= 48 && first <= 57) || NEUTRAL.has(word);
}

/** A word with a meaning here, or one that is known to have none. */
export function isWord(word: string): boolean {
  return CONCEPTS.has(word) || NEUTRAL.has(word);
}

/** A combination of concepts that names a parameter, and concepts that speak against it. */
export interface Phrase {
  readonly parameter: ParameterName;
  readonly concepts: readonly string[];
  /** 0 to 1: how surely the concepts mean the parameter. */
  readonly score: number;
  readonly unless: readonly string[];
}

function phrase(parameter: ParameterName, concepts: string, score: number, unless = ""): Phrase {
  return {
    parameter,
    concepts: concepts.split(" "),
    score,
    unless: unless === "" ? [] : unless.split(" "),
  };
}

const PHRASES: readonly Phrase[] = [
  phrase("run_current", "run current", 0.85, "hold delay scale"),
  phrase("run_current", "rms current", 0.75, "hold delay"),
  phrase("run_current", "peak current", 0.7, "hold delay"),
  phrase("run_current", "current", 0.65, "hold scale delay home limit"),
  phrase("hold_current", "hold current", 0.85, "delay scale"),
  phrase("hold_current", "hold", 0.4, "delay scale direction travel"),
  phrase("reference_voltage", "reference voltage", 0.85, "speed"),
  phrase("current_scale", "current scale", 0.75, "hold"),
  phrase("current_scale", "run scale", 0.7, "hold"),
  phrase("hold_scale", "hold scale", 0.75),
  phrase("sense_resistance", "sense resistance", 0.85),
  phrase("sense_resistance", "sense", 0.5),
  phrase("microsteps", "microsteps", 0.85),
  phrase("microsteps", "micro steps", 0.85),
  phrase("steps_per_mm", "steps per distance", 0.9, "micro"),
  phrase("steps_per_mm", "steps distance", 0.8, "micro"),
  phrase("steps_per_mm", "steps per angle", 0.9, "micro"),
  phrase("steps_per_mm", "steps angle", 0.75, "micro"),
  phrase("steps_per_mm", "pulse per distance", 0.85),
  phrase("steps_per_mm", "steps per", 0.55, "micro"),
  phrase("max_speed", "max speed", 0.85, "home corner acceleration"),
  phrase("max_speed", "speed", 0.5, "home corner acceleration min jerk"),
  phrase("acceleration", "acceleration", 0.8, "jerk"),
  phrase("jerk", "jerk", 0.6),
  phrase("corner_speed", "corner speed", 0.85),
  phrase("corner_speed", "corner", 0.55, "deviation"),
  phrase("corner_speed", "jerk", 0.55),
  phrase("corner_deviation", "corner deviation", 0.85),
  phrase("travel_min", "travel min", 0.8, "speed acceleration current"),
  phrase("travel_min", "min", 0.45, "speed acceleration current rate pulse scale delay"),
  phrase("travel_max", "travel max", 0.8, "speed acceleration current"),
  phrase("travel_max", "travel", 0.5, "min speed acceleration current home"),
  phrase("travel_max", "max", 0.4, "speed acceleration current rate pulse scale jerk corner steps voltage"),
  phrase("reference_run_speed", "home speed", 0.85),
  phrase("reference_run_speed", "reference run speed", 0.9),
  phrase("reference_run_speed", "reference speed", 0.7),
  phrase("pulse_width", "pulse width", 0.85),
  phrase("pulse_width", "steps width", 0.7),
  phrase("pulse_width", "pulse delay", 0.65),
  phrase("pulse_width", "steps delay", 0.5, "hold direction"),
  phrase("pulse_width", "pulse", 0.45, "per"),
  phrase("direction_setup", "direction setup", 0.85),
  phrase("direction_setup", "direction delay", 0.75),
  phrase("direction_reversed", "direction invert", 0.9),
  phrase("direction_reversed", "invert", 0.6, "speed"),
  phrase("driver_interpolation", "interpolation", 0.85),
  phrase("standstill_delay", "hold delay", 0.75),
  phrase("supply_voltage", "supply voltage", 0.85),
  phrase("supply_voltage", "supply", 0.55),
  phrase("max_step_rate", "max steps rate", 0.85),
  phrase("max_step_rate", "steps rate", 0.6),
];

/** Phrases by their first concept. */
export const PHRASES_OF: ReadonlyMap<string, readonly Phrase[]> = byFirstConcept();

function byFirstConcept(): Map<string, Phrase[]> {
  const groups = new Map<string, Phrase[]>();
  for (const one of PHRASES) {
    const first = one.concepts[0] ?? "";
    groups.set(first, [...(groups.get(first) ?? []), one]);
  }
  return groups;
}

/** Endings of a name that state its unit, longest first. */
export const UNIT_ENDINGS: readonly (readonly [readonly string[], string])[] = [
  [["mm", "s", "2"], "mm/s²"],
  [["mm", "s", "3"], "mm/s³"],
  [["mm", "per", "min"], "mm/min"],
  [["mm", "per", "s"], "mm/s"],
  [["steps", "s", "2"], "steps/s²"],
  [["deg", "s", "2"], "deg/s²"],
  [["mm", "min"], "mm/min"],
  [["mm", "s"], "mm/s"],
  [["deg", "s"], "deg/s"],
  [["steps", "s"], "steps/s"],
  [["mms"], "mm/s"],
  [["mmss"], "mm/s²"],
  [["ma"], "mA"],
  [["amps"], "A"],
  [["mv"], "mV"],
  [["volts"], "V"],
  [["mohm"], "mΩ"],
  [["ohm"], "Ω"],
  [["ohms"], "Ω"],
  [["mm"], "mm"],
  [["um"], "µm"],
  [["deg"], "deg"],
  [["us"], "µs"],
  [["ns"], "ns"],
  [["ms"], "ms"],
  [["hz"], "Hz"],
  [["khz"], "kHz"],
  [["rpm"], "rpm"],
  [["percent"], "%"],
  [["pct"], "%"],
];
