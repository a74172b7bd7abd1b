import { parse } from "yaml";
import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import type { KeyTable } from "@/lib/domain/key-table";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { checkConfiguration } from "@/lib/review/check";
import type { CheckInput } from "@/lib/review/types";

const AXES = ["x", "y", "z", "a", "b"];
const KEYS = 400;
const WARM_UP = 300;
const RUNS = 200;

/** Known keys of one axis: key, value, rule. */
const KNOWN: readonly [string, string, Omit<KeyTable["rules"][number], "key">][] = [
  ["run_ma", "800", { parameter: "run_current", unit: "mA", basis: "rms" }],
  ["hold_ma", "500", { parameter: "hold_current", unit: "mA", basis: "rms" }],
  ["subdivide", "16", { parameter: "microsteps" }],
  ["scale", "80", { parameter: "steps_per_mm", unit: "1/mm" }],
  ["top_speed", "300", { parameter: "max_speed", unit: "mm/s" }],
  ["accel", "6000", { parameter: "acceleration", unit: "mm/s²" }],
  ["jump", "12", { parameter: "corner_speed", unit: "mm/s" }],
  ["lower_end", "0", { parameter: "travel_min", unit: "mm" }],
  ["upper_end", "400", { parameter: "travel_max", unit: "mm" }],
  ["seek_speed", "40", { parameter: "reference_run_speed", unit: "mm/s" }],
  ["pulse", "2", { parameter: "pulse_width", unit: "µs" }],
  ["direction_wait", "5", { parameter: "direction_setup", unit: "µs" }],
];

const AXIS: Omit<AxisAssembly, "axis"> = {
  motor_count: 1,
  motor: {
    rated_current_a: 1.5,
    rated_current_basis: "rms",
    resistance_ohm: 2.1,
    inductance_mh: 3,
    holding_torque_nm: 0.45,
    detent_torque_nm: 0.012,
    rotor_inertia_gcm2: 54,
    step_angle_deg: 1.8,
    winding_limit_c: 130,
    winding_to_ambient_k_per_w: 8.5,
    case_to_ambient_k_per_w: 7,
  },
  driver: {
    max_current_a: 2,
    max_current_basis: "rms",
    rds_on_ohm: 0.25,
    rds_on_at_c: 25,
    junction_to_ambient_k_per_w: 35,
    junction_limit_c: 150,
    quiescent_power_w: 0.1,
    operating_max_v: 29,
    absolute_max_v: 33,
    min_pulse_high_us: 1,
    min_pulse_low_us: 1,
    min_on_time_us: 1.5,
    chopping_frequency_hz: 30_000,
    decay_mode: "slow",
    set_point: { method: "direct", sense_resistance_ohm: 0.1, sense_resistor_rating_w: 0.25 },
  },
  drive_train: { kind: "belt", pitch_mm: 2, teeth: 20, efficiency: 0.95 },
  load: { mass_kg: 0.6, friction_n: 4, incline_deg: 0 },
  mount: { softening_c: 60 },
};

const ASSEMBLY: Assembly = {
  ambient_c: 35,
  enclosure_rise_k: 5,
  supply: { voltage_v: 24, rated_power_w: 150, bus_capacitance_uf: 1000 },
  controller_board: { max_step_rate_hz: 100_000 },
  axes: AXES.map((axis) => ({ axis, ...AXIS })),
};

/** Keys and values of one axis: those that the key table knows, then others of the same manner. */
function entriesOf(axis: string): [string, string][] {
  const known: [string, string][] = KNOWN.map(([key, value]) => [key, value]);
  const others = Array.from({ length: KEYS / AXES.length - known.length }, (_, index): [string, string] => [
    `option_${axis}_${index}`,
    index % 3 === 0 ? `"word ${index}"` : index % 3 === 1 ? String(index * 1.5) : "true",
  ]);
  return [...known, ...others];
}

function linesText(): string {
  return AXES.map((axis) => {
    const lines = entriesOf(axis).map(([key, value]) => `${key} = ${value}  # ${key} of the axis`);
    return [`[axis.${axis}]`, ...lines, ""].join("\n");
  }).join("\n");
}

/** The same keys, values and comments as YAML. */
function yamlText(): string {
  const axes = AXES.map((axis) => {
    const lines = entriesOf(axis).map(([key, value]) => `    ${key}: ${value}  # ${key} of the axis`);
    return [`  ${axis}:`, ...lines].join("\n");
  });
  return ["axis:", ...axes, ""].join("\n");
}

function keyTable(): KeyTable {
  return { rules: KNOWN.map(([key, , rule]) => ({ key: `axis.{axis}.${key}`, ...rule })) };
}

interface Timing {
  readonly fastest: number;
  readonly median: number;
  readonly p95: number;
}

/** Milliseconds of each run; the two take turns, so that a busy machine slows both alike. */
function timings(one: () => unknown, other: () => unknown): [Timing, Timing] {
  const times: [number[], number[]] = [[], []];
  for (let count = 0; count < WARM_UP + RUNS; count += 1)
    for (const [own, run] of [[times[0], one] as const, [times[1], other] as const]) {
      const start = performance.now();
      run();
      if (count >= WARM_UP) own.push(performance.now() - start);
    }
  return [summary(times[0]), summary(times[1])];
}

function summary(times: readonly number[]): Timing {
  const sorted = [...times].sort((a, b) => a - b);
  const at = (share: number): number => sorted[Math.floor(RUNS * share)] ?? NaN;
  return { fastest: at(0), median: at(0.5), p95: at(0.95) };
}

function words({ median, p95, fastest }: Timing): string {
  return `median ${median.toFixed(2)} ms, p95 ${p95.toFixed(2)} ms, fastest ${fastest.toFixed(2)} ms`;
}

/** A text of 400 keys for a machine of five axes. */
export function benchInput(): CheckInput {
  return {
    files: [{ path: "bench.conf", text: linesText() }],
    keyTable: keyTable(),
    assembly: ASSEMBLY,
    policy: DEFAULT_POLICY,
  };
}

/** Text → findings for a 5-axis, 400-key text beside the time that the package `yaml` takes just to parse the same content. */
export function runCheckBench(): string[] {
  const input = benchInput();
  const report = checkConfiguration(input);
  const yaml = yamlText();
  const [check, parsed] = timings(
    () => checkConfiguration(input),
    () => parse(yaml),
  );
  const share = (check.median / parsed.median).toFixed(2);
  const fastest = (check.fastest / parsed.fastest).toFixed(2);
  return [
    `text → findings, ${AXES.length} axes, ${report.documents[0]?.entries ?? 0} keys, ${report.findings.length} findings: ${words(check)}`,
    `yaml, parsing the same content only: ${words(parsed)}`,
    `share of the time of yaml: ${share}, of the fastest runs ${fastest} (aim: 0.20)`,
  ];
}
