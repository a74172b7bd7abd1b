import type { AxisKind } from "./axis-kind";

/** What a parameter or a catalog field measures. `speed`, `acceleration`, `jerk`, `length` and `scale` fit both kinds of axis. */
export type Dimension =
  | "current"
  | "voltage"
  | "resistance"
  | "length"
  | "speed"
  | "acceleration"
  | "jerk"
  | "scale"
  | "time"
  | "frequency"
  | "count"
  | "boolean"
  | "torque"
  | "inertia"
  | "inductance"
  | "share";

interface Unit {
  readonly dimension: Dimension;
  /** Multiply by this to get the inside unit (SI; 1/mm and 1/deg for the scale). */
  readonly factor: number;
  /** Only for axes of this kind; null fits both. */
  readonly kind: AxisKind | null;
  /** `steps`: divide by the steps per metre (or radian). `turns`: motor turns; multiply by the travel per turn. */
  readonly via?: "steps" | "turns";
}

const INCH = 0.0254;
const DEG = Math.PI / 180;
/** N: the pound in kg times standard gravity in m/s², both exact. */
const POUND_FORCE = 0.45359237 * 9.80665;
const u = (dimension: Dimension, factor: number, kind: AxisKind | null = null, via?: Unit["via"]): Unit => ({
  dimension,
  factor,
  kind,
  ...(via ? { via } : {}),
});

/** Factors: SI Brochure (9th ed., 2019) and NIST SP 811 Appendix B for inch, ounce-force and pound-force. */
const UNITS: ReadonlyMap<string, Unit> = new Map([
  ["A", u("current", 1)],
  ["mA", u("current", 1e-3)],
  ["V", u("voltage", 1)],
  ["mV", u("voltage", 1e-3)],
  ["Ω", u("resistance", 1)],
  ["mΩ", u("resistance", 1e-3)],
  ["mm", u("length", 1e-3, "linear")],
  ["m", u("length", 1, "linear")],
  ["µm", u("length", 1e-6, "linear")],
  ["in", u("length", INCH, "linear")],
  ["deg", u("length", DEG, "rotary")],
  ["rad", u("length", 1, "rotary")],
  ["mm/s", u("speed", 1e-3, "linear")],
  ["mm/min", u("speed", 1e-3 / 60, "linear")],
  ["m/s", u("speed", 1, "linear")],
  ["m/min", u("speed", 1 / 60, "linear")],
  ["in/s", u("speed", INCH, "linear")],
  ["in/min", u("speed", INCH / 60, "linear")],
  ["deg/s", u("speed", DEG, "rotary")],
  ["rad/s", u("speed", 1, "rotary")],
  ["rpm", u("speed", 1 / 60, null, "turns")],
  ["steps/s", u("speed", 1, null, "steps")],
  ["mm/s²", u("acceleration", 1e-3, "linear")],
  ["m/s²", u("acceleration", 1, "linear")],
  ["deg/s²", u("acceleration", DEG, "rotary")],
  ["rad/s²", u("acceleration", 1, "rotary")],
  ["steps/s²", u("acceleration", 1, null, "steps")],
  ["mm/s³", u("jerk", 1e-3, "linear")],
  ["m/s³", u("jerk", 1, "linear")],
  ["rad/s³", u("jerk", 1, "rotary")],
  ["deg/s³", u("jerk", DEG, "rotary")],
  ["1/mm", u("scale", 1, "linear")],
  ["1/deg", u("scale", 1, "rotary")],
  ["s", u("time", 1)],
  ["ms", u("time", 1e-3)],
  ["µs", u("time", 1e-6)],
  ["ns", u("time", 1e-9)],
  ["Hz", u("frequency", 1)],
  ["kHz", u("frequency", 1e3)],
  ["%", u("share", 0.01)],
  ["N·m", u("torque", 1)],
  ["N·cm", u("torque", 1e-2)],
  ["mN·m", u("torque", 1e-3)],
  ["oz·in", u("torque", (POUND_FORCE / 16) * INCH)],
  ["lb·in", u("torque", POUND_FORCE * INCH)],
  ["g·cm²", u("inertia", 1e-7)],
  ["kg·m²", u("inertia", 1)],
  ["H", u("inductance", 1)],
  ["mH", u("inductance", 1e-3)],
]);

/** Other spellings of the units above. */
const SPELLINGS: ReadonlyMap<string, string> = new Map([
  ["ohm", "Ω"],
  ["Ohm", "Ω"],
  ["\u2126", "Ω"],
  ["mohm", "mΩ"],
  ["mOhm", "mΩ"],
  ["m\u2126", "mΩ"],
  ["um", "µm"],
  ["\u03bcm", "µm"],
  ["us", "µs"],
  ["\u03bcs", "µs"],
  ["mm/s^2", "mm/s²"],
  ["mm/s2", "mm/s²"],
  ["m/s^2", "m/s²"],
  ["m/s2", "m/s²"],
  ["deg/s^2", "deg/s²"],
  ["rad/s^2", "rad/s²"],
  ["steps/s^2", "steps/s²"],
  ["mm/s^3", "mm/s³"],
  ["m/s^3", "m/s³"],
  ["deg/s^3", "deg/s³"],
  ["rad/s^3", "rad/s³"],
  ["steps/mm", "1/mm"],
  ["steps/deg", "1/deg"],
  ["RPM", "rpm"],
  ["Nm", "N·m"],
  ["N.m", "N·m"],
  ["Ncm", "N·cm"],
  ["N.cm", "N·cm"],
  ["mNm", "mN·m"],
  ["mN.m", "mN·m"],
  ["oz-in", "oz·in"],
  ["oz.in", "oz·in"],
  ["lb-in", "lb·in"],
  ["lb.in", "lb·in"],
  ["g.cm2", "g·cm²"],
  ["g·cm2", "g·cm²"],
  ["gcm2", "g·cm²"],
  ["gcm²", "g·cm²"],
  ["kg.m2", "kg·m²"],
  ["kg·m2", "kg·m²"],
  ["kgm2", "kg·m²"],
  ["kgm²", "kg·m²"],
]);

/** The house spelling of a unit, or null for an unknown one. Case counts, since mA and MA, ms and Ms differ. */
export function canonicalUnit(written: string): string | null {
  const unit = written.trim();
  if (UNITS.has(unit)) return unit;
  return SPELLINGS.get(unit) ?? null;
}

export function unitDimension(written: string): Dimension | null {
  const unit = canonicalUnit(written);
  return unit === null ? null : (UNITS.get(unit)?.dimension ?? null);
}

/** Every unit of a dimension in its house spelling, for choice lists. */
export function unitsOf(dimension: Dimension, kind: AxisKind = "linear"): string[] {
  return [...UNITS]
    .filter(([, unit]) => unit.dimension === dimension && (unit.kind ?? kind) === kind)
    .map(([name]) => name);
}

/** What the conversion of step- and turn-based units rests on. */
export interface UnitContext {
  readonly kind: AxisKind;
  /** Steps per metre (linear) or per radian (rotary). */
  readonly stepsPerUnit?: number | undefined;
  /** Metres (linear) or radians (rotary) of the axis for one turn: of the motor (linear), of the axis itself (rotary). */
  readonly travelPerTurn?: number | undefined;
}

export type Conversion =
  | { readonly ok: true; readonly value: number }
  | {
      readonly ok: false;
      readonly code: "unknown-unit" | "wrong-unit" | "scale-missing";
      readonly reason: string;
    };

/** Factor from the written unit to the inside unit of `dimension`. */
export function unitFactor(written: string, dimension: Dimension, context: UnitContext): Conversion {
  const name = canonicalUnit(written);
  const unit = name === null ? undefined : UNITS.get(name);
  if (!unit) return { ok: false, code: "unknown-unit", reason: `The unit “${written}” is not known.` };
  if (unit.dimension !== dimension || (unit.kind !== null && unit.kind !== context.kind))
    return {
      ok: false,
      code: "wrong-unit",
      reason: `“${written}” is not a unit of ${dimension} on a ${context.kind} axis.`,
    };
  return viaFactor(unit, written, context);
}

function viaFactor(unit: Unit, written: string, context: UnitContext): Conversion {
  if (unit.via === "steps") {
    if (!context.stepsPerUnit)
      return {
        ok: false,
        code: "scale-missing",
        reason: `“${written}” needs the steps per ${context.kind === "rotary" ? "degree" : "mm"}.`,
      };
    return { ok: true, value: unit.factor / context.stepsPerUnit };
  }
  if (unit.via === "turns") {
    if (context.kind === "rotary") return { ok: true, value: unit.factor * 2 * Math.PI };
    if (!context.travelPerTurn)
      return {
        ok: false,
        code: "scale-missing",
        reason: `“${written}” needs the travel per turn of the drive train.`,
      };
    return { ok: true, value: unit.factor * context.travelPerTurn };
  }
  return { ok: true, value: unit.factor };
}

/** By kind of axis. */
const INSIDE: Readonly<Record<Dimension, Readonly<Record<AxisKind, string>>>> = {
  current: { linear: "A", rotary: "A" },
  voltage: { linear: "V", rotary: "V" },
  resistance: { linear: "Ω", rotary: "Ω" },
  length: { linear: "m", rotary: "rad" },
  speed: { linear: "m/s", rotary: "rad/s" },
  acceleration: { linear: "m/s²", rotary: "rad/s²" },
  jerk: { linear: "m/s³", rotary: "rad/s³" },
  scale: { linear: "1/mm", rotary: "1/deg" },
  time: { linear: "s", rotary: "s" },
  frequency: { linear: "Hz", rotary: "Hz" },
  count: { linear: "", rotary: "" },
  boolean: { linear: "", rotary: "" },
  torque: { linear: "N·m", rotary: "N·m" },
  inertia: { linear: "kg·m²", rotary: "kg·m²" },
  inductance: { linear: "H", rotary: "H" },
  share: { linear: "%", rotary: "%" },
};

/** Unit in which a dimension is kept inside; the scale is 1/mm or 1/deg, everything else SI. */
export function insideUnit(dimension: Dimension, kind: AxisKind): string {
  return INSIDE[dimension][kind];
}

interface Shown {
  readonly unit: string;
  readonly factor: number;
}

const SHOWN: ReadonlyMap<string, Shown> = new Map([
  ["m/s", { unit: "mm/s", factor: 1e3 }],
  ["m/s²", { unit: "mm/s²", factor: 1e3 }],
  ["m/s³", { unit: "mm/s³", factor: 1e3 }],
  ["m", { unit: "mm", factor: 1e3 }],
  ["rad", { unit: "deg", factor: 1 / DEG }],
  ["rad/s", { unit: "deg/s", factor: 1 / DEG }],
  ["rad/s²", { unit: "deg/s²", factor: 1 / DEG }],
  ["rad/s³", { unit: "deg/s³", factor: 1 / DEG }],
]);

/** The unit that people on the floor read: mm/s rather than m/s. Returns the factor from inside to shown. */
export function shownUnit(unit: string): Shown {
  return SHOWN.get(unit) ?? { unit, factor: 1 };
}

/**
 * A number to at most `digits` significant digits, without trailing zeros; the digits before the point are never cut.
 * Below 1e-4 and from 1e7 on with an exponent.
 */
export function formatNumber(value: number, digits = 3): string {
  if (!Number.isFinite(value)) return "–";
  if (value === 0) return "0";
  const size = Math.abs(value);
  if (size >= 1e7 || size < 1e-4) return value.toExponential(digits - 1).replace(/\.?0+e/, "e");
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(size)));
  return size >= 10 ** digits
    ? Math.round(value).toString()
    : trimZeros(value.toFixed(Math.min(decimals, 12)));
}

/** Without the zeros that end a fraction, and without its point where nothing is left of it. */
function trimZeros(text: string): string {
  if (!text.includes(".")) return text;
  let end = text.length;
  while (text.charAt(end - 1) === "0") end--;
  return text.slice(0, text.charAt(end - 1) === "." ? end - 1 : end);
}

const SMALLER: Record<string, readonly [number, string][]> = {
  Hz: [[1e3, "kHz"]],
  "N·m": [
    [1, "N·m"],
    [1e-3, "mN·m"],
  ],
  s: [
    [1, "s"],
    [1e-3, "ms"],
    [1e-6, "µs"],
    [1e-9, "ns"],
  ],
};

/**
 * Number and unit as shown on a page: `shownUnit` first, then a multiple that keeps the number readable. What rounds
 * to 1 of the larger unit is shown in it, so that 0.9999 s is 1 s and not 1000 ms.
 */
export function showQuantity(
  value: number,
  unit: string,
  digits = 3,
): { readonly number: string; readonly unit: string } {
  const shown = shownUnit(unit);
  const scaled = value * shown.factor;
  const least = 1 - 0.5 * 10 ** -digits;
  for (const [size, name] of SMALLER[shown.unit] ?? []) {
    if (Math.abs(scaled) >= size * least) return { number: formatNumber(scaled / size, digits), unit: name };
  }
  return { number: formatNumber(scaled, digits), unit: shown.unit };
}

export function showText(value: number, unit: string, digits = 3): string {
  const shown = showQuantity(value, unit, digits);
  return shown.unit === "" ? shown.number : `${shown.number} ${shown.unit}`;
}
