import type { Load } from "../../lib/domain/assembly";
import type { KeyRule } from "../../lib/domain/key-table";

interface DemoAxis {
  readonly axis: string;
  readonly motor: string;
  readonly drive_train: string;
  readonly mount: string;
  readonly motor_count?: number;
  readonly load: Load;
  readonly travel_mm?: number;
  readonly travel_deg?: number;
}

/** Numbers of one axis as the floor knows them: A rms, mm/s (deg/s), mm/s² (deg/s²), steps per mm (deg). */
export interface AxisNumbers {
  readonly run: number;
  readonly hold: number;
  readonly subdivide: number;
  readonly scale: number;
  readonly speed: number;
  readonly accel: number;
  readonly corner: number;
}

export type ModelNumbers = Readonly<Record<string, AxisNumbers>>;

export interface DemoModel {
  readonly code: string;
  readonly name: string;
  readonly driver: string;
  readonly supply: string;
  readonly controller_board: string;
  readonly enclosure_rise_k: number;
  readonly axes: readonly DemoAxis[];
  readonly rules: readonly KeyRule[];
  readonly numbers: ModelNumbers;
  /** Name and text of the file that the firmware starts from. */
  readonly path: string;
  readonly text: (numbers: ModelNumbers) => string;
}

/** Values that the controllers of all three models keep and give back, line by line. */
export function storedText(numbers: ModelNumbers): string {
  const lines = Object.entries(numbers).flatMap(([axis, own]) => {
    const name = axis.toUpperCase();
    return [
      `${name}_AMPS ${own.run}`,
      `${name}_STANDBY ${own.hold}`,
      `${name}_SUBDIV ${own.subdivide}`,
      `${name}_SCALE ${own.scale}`,
      `${name}_VMAX ${own.speed}`,
      `${name}_ACC ${own.accel}`,
      `${name}_CORNER ${own.corner}`,
    ];
  });
  return `; values kept in the controller\n${lines.join("\n")}\n`;
}

const ROTARY = new Set(["a"]);

/** The same keys for every axis of a dump; rotary axes are in degrees. Without `standby` its basis is not known yet. */
export function storedRules(axes: readonly string[], standby?: "rms"): KeyRule[] {
  return axes.flatMap((axis): KeyRule[] => {
    const name = axis.toUpperCase();
    const unit = ROTARY.has(axis) ? "deg" : "mm";
    const rule = (key: string, rest: Omit<KeyRule, "key">): KeyRule => ({
      key: `${name}_${key}`,
      axis,
      layer: "stored",
      ...rest,
    });
    return [
      rule("AMPS", { parameter: "run_current", unit: "A", basis: "rms" }),
      rule("STANDBY", { parameter: "hold_current", unit: "A", ...(standby ? { basis: standby } : {}) }),
      rule("SUBDIV", { parameter: "microsteps" }),
      rule("SCALE", { parameter: "steps_per_mm" }),
      rule("VMAX", { parameter: "max_speed", unit: `${unit}/s` }),
      rule("ACC", { parameter: "acceleration", unit: `${unit}/s²` }),
      rule("CORNER", { parameter: "corner_speed", unit: `${unit}/s` }),
    ];
  });
}

const GANTRY_AXES = ["x", "y", "z", "a", "u"];

function gantryText(numbers: ModelNumbers): string {
  const head = [
    "# Dosing gantry 3, motion",
    "# lengths in mm, angles in deg, currents rms in each winding",
    "",
    "[machine]",
    'name = "dosing gantry"',
    "beeper = on",
    "",
  ];
  const axes = GANTRY_AXES.flatMap((axis) => {
    const own = numbers[axis];
    if (!own) return [];
    const unit = ROTARY.has(axis) ? "deg" : "mm";
    return [
      `[axis.${axis}]`,
      `amps_rms = ${own.run}`,
      `standby_amps = ${own.hold}`,
      `subdivide = ${own.subdivide}`,
      `scale = ${own.scale}`,
      `vmax = ${own.speed}      # ${unit}/s`,
      `acc = ${own.accel}     # ${unit}/s^2`,
      `corner = ${own.corner}`,
      ...(axis === "z" ? ["# standby_amps = 0.3   ; too little: the head crept down overnight"] : []),
      "",
    ];
  });
  return [...head, ...axes, "[dosing]", "drip_guard_ms = 120", "park_height = 42", ""].join("\n");
}

function gantryRules(): KeyRule[] {
  return [
    { key: "axis.{axis}.amps_rms", parameter: "run_current", unit: "A", basis: "rms" },
    { key: "axis.{axis}.standby_amps", parameter: "hold_current", unit: "A", basis: "rms" },
    { key: "axis.{axis}.subdivide", parameter: "microsteps" },
    { key: "axis.{axis}.scale", parameter: "steps_per_mm" },
    ...GANTRY_AXES.flatMap((axis): KeyRule[] => {
      const unit = ROTARY.has(axis) ? "deg" : "mm";
      return [
        { key: `axis.${axis}.vmax`, axis, parameter: "max_speed", unit: `${unit}/s` },
        { key: `axis.${axis}.acc`, axis, parameter: "acceleration", unit: `${unit}/s²` },
        { key: `axis.${axis}.corner`, axis, parameter: "corner_speed", unit: `${unit}/s` },
      ];
    }),
    ...storedRules(GANTRY_AXES, "rms"),
  ];
}

const DRAFTER_AXES = ["x", "y", "z"];

function drafterText(numbers: ModelNumbers): string {
  const list = (pick: (own: AxisNumbers) => number) =>
    DRAFTER_AXES.map((axis) => pick(numbers[axis] as AxisNumbers)).join(", ");
  return [
    "; Label drafter 2: carriage x, bridge y, pen z",
    "[drive]",
    `run_ma: ${list((own) => Math.round(own.run * 1000))}`,
    `standby_ma: ${list((own) => Math.round(own.hold * 1000))}`,
    `subdivide: ${list((own) => own.subdivide)}`,
    `scale: ${list((own) => own.scale)}`,
    "",
    "[travel]",
    `vmax: ${list((own) => own.speed)}     ; mm/s`,
    `acc: ${list((own) => own.accel)}   ; mm/s^2`,
    `corner: ${list((own) => own.corner)}`,
    "pen_lift_ms: 80",
    ";eco_mode: yes",
    "",
  ].join("\n");
}

const DRAFTER_RULES: readonly KeyRule[] = [
  { key: "drive.run_ma.{axis}", parameter: "run_current", unit: "mA", basis: "rms" },
  // Nobody has said yet whether the standby current is peak or rms.
  { key: "drive.standby_ma.{axis}", parameter: "hold_current", unit: "mA" },
  { key: "drive.subdivide.{axis}", parameter: "microsteps" },
  { key: "drive.scale.{axis}", parameter: "steps_per_mm" },
  { key: "travel.vmax.{axis}", parameter: "max_speed", unit: "mm/s" },
  { key: "travel.acc.{axis}", parameter: "acceleration", unit: "mm/s²" },
  { key: "travel.corner.{axis}", parameter: "corner_speed", unit: "mm/s" },
];

const SHUTTLE_AXES = ["u", "v"];

function shuttleText(numbers: ModelNumbers): string {
  const list = (pick: (own: AxisNumbers) => number) =>
    `{ ${SHUTTLE_AXES.map((axis) => pick(numbers[axis] as AxisNumbers)).join(", ")} }`;
  return [
    "/* Tray shuttle: u carries, v lifts the tray sideways. */",
    "#ifndef SHUTTLE_MOTION_H",
    "#define SHUTTLE_MOTION_H",
    "",
    `#define PHASE_AMPS_RMS ${list((own) => own.run)}`,
    `#define PHASE_AMPS_IDLE ${list((own) => own.hold)}`,
    `#define SUBDIVIDE ${list((own) => own.subdivide)}`,
    `#define PULSES_PER_MM ${list((own) => own.scale)}`,
    "",
    "#if TRAY_LOADED",
    "#define TRAY_SENSOR_PIN 12",
    "#else",
    "#define TRAY_SENSOR_PIN 14",
    "#endif",
    "",
    `#define TOP_SPEED ${list((own) => own.speed)} // mm/s`,
    `#define RAMP ${list((own) => own.accel)} // mm/s^2`,
    `#define CORNER_STEP ${list((own) => own.corner)} // mm/s`,
    "//#define RAMP_GENTLE { 1200, 800 }",
    "",
    "#endif",
    "",
  ].join("\n");
}

const SHUTTLE_RULES: readonly KeyRule[] = [
  { key: "PHASE_AMPS_RMS.{axis}", parameter: "run_current", unit: "A", basis: "rms" },
  { key: "PHASE_AMPS_IDLE.{axis}", parameter: "hold_current", unit: "A", basis: "rms" },
  { key: "SUBDIVIDE.{axis}", parameter: "microsteps" },
  { key: "PULSES_PER_MM.{axis}", parameter: "steps_per_mm" },
  { key: "TOP_SPEED.{axis}", parameter: "max_speed", unit: "mm/s" },
  { key: "RAMP.{axis}", parameter: "acceleration", unit: "mm/s²" },
  { key: "CORNER_STEP.{axis}", parameter: "corner_speed", unit: "mm/s" },
];

const level = { incline_deg: 0, external_force_n: 0 };

export const DEMO_MODELS: readonly DemoModel[] = [
  {
    code: "dosing-gantry-3",
    name: "Dosing gantry 3",
    driver: "axis-driver",
    supply: "supply-24",
    controller_board: "desk-controller",
    enclosure_rise_k: 6,
    path: "gantry/axes.conf",
    axes: [
      {
        axis: "x",
        motor: "carriage-motor",
        drive_train: "carriage-belt",
        mount: "printed-mount",
        load: { ...level, mass_kg: 1.4, friction_n: 8 },
        travel_mm: 400,
      },
      {
        axis: "y",
        motor: "carriage-motor",
        drive_train: "carriage-belt",
        mount: "printed-mount",
        load: { ...level, mass_kg: 1.6, friction_n: 7 },
        travel_mm: 300,
      },
      {
        axis: "z",
        motor: "lift-motor",
        drive_train: "lift-screw",
        mount: "plate-mount",
        load: { incline_deg: 90, mass_kg: 14, friction_n: 9, holding_brake: false },
        travel_mm: 90,
      },
      {
        axis: "a",
        motor: "small-motor",
        drive_train: "valve-gear",
        mount: "plate-mount",
        load: { inertia_kgm2: 2e-5, friction_nm: 0.04, gravity_torque_nm: 0 },
        travel_deg: 180,
      },
      {
        axis: "u",
        motor: "small-motor",
        drive_train: "feed-screw",
        mount: "plate-mount",
        load: { ...level, mass_kg: 0.2, friction_n: 8 },
        travel_mm: 60,
      },
    ],
    rules: gantryRules(),
    text: gantryText,
    numbers: {
      x: { run: 0.85, hold: 0.5, subdivide: 16, scale: 80, speed: 300, accel: 6000, corner: 12 },
      y: { run: 0.85, hold: 0.5, subdivide: 16, scale: 80, speed: 250, accel: 4500, corner: 12 },
      z: { run: 1.1, hold: 0.6, subdivide: 16, scale: 800, speed: 30, accel: 300, corner: 3 },
      a: { run: 0.4, hold: 0.3, subdivide: 16, scale: 35.5556, speed: 180, accel: 1500, corner: 10 },
      u: { run: 0.4, hold: 0.2, subdivide: 16, scale: 1600, speed: 12, accel: 80, corner: 1 },
    },
  },
  {
    code: "label-drafter-2",
    name: "Label drafter 2",
    driver: "axis-driver",
    supply: "supply-24",
    controller_board: "desk-controller",
    enclosure_rise_k: 4,
    path: "drafter.conf",
    axes: [
      {
        axis: "x",
        motor: "carriage-motor",
        drive_train: "carriage-belt",
        mount: "printed-mount",
        load: { ...level, mass_kg: 1.2, friction_n: 7 },
        travel_mm: 620,
      },
      {
        axis: "y",
        motor: "carriage-motor",
        drive_train: "carriage-belt",
        mount: "printed-mount",
        load: { ...level, mass_kg: 1.7, friction_n: 8 },
        travel_mm: 440,
      },
      {
        axis: "z",
        motor: "small-motor",
        drive_train: "feed-screw",
        mount: "plate-mount",
        load: { incline_deg: 90, mass_kg: 0.12, friction_n: 1.5, holding_brake: false },
        travel_mm: 8,
      },
    ],
    rules: [...DRAFTER_RULES, ...storedRules(DRAFTER_AXES)],
    text: drafterText,
    numbers: {
      x: { run: 0.9, hold: 0.45, subdivide: 16, scale: 80, speed: 350, accel: 5000, corner: 12 },
      y: { run: 0.9, hold: 0.45, subdivide: 16, scale: 80, speed: 300, accel: 4000, corner: 12 },
      z: { run: 0.4, hold: 0.25, subdivide: 8, scale: 800, speed: 10, accel: 150, corner: 1 },
    },
  },
  {
    code: "tray-shuttle",
    name: "Tray shuttle",
    driver: "shuttle-driver",
    supply: "supply-30",
    controller_board: "shuttle-controller",
    enclosure_rise_k: 8,
    path: "shuttle_motion.h",
    axes: [
      {
        axis: "u",
        motor: "lift-motor",
        drive_train: "shuttle-belt",
        mount: "plate-mount",
        load: { ...level, mass_kg: 1.6, friction_n: 7 },
        travel_mm: 900,
      },
      {
        axis: "v",
        motor: "carriage-motor",
        drive_train: "lift-screw",
        mount: "plate-mount",
        load: { incline_deg: 30, mass_kg: 1.1, friction_n: 4, holding_brake: false },
        travel_mm: 120,
      },
    ],
    rules: [...SHUTTLE_RULES, ...storedRules(SHUTTLE_AXES, "rms")],
    text: shuttleText,
    numbers: {
      u: { run: 1.4, hold: 0.7, subdivide: 8, scale: 33.3333, speed: 500, accel: 2500, corner: 12 },
      v: { run: 0.8, hold: 0.5, subdivide: 16, scale: 800, speed: 40, accel: 400, corner: 4 },
    },
  },
];
