import { afterAll, describe, expect, it } from "vitest";
import { peakFromRms, rmsFromPeak } from "@/lib/physics/current-conventions";
import { stepsPerTravel } from "@/lib/physics/drive-train";
import { conductionLoss, driverSteadyState } from "@/lib/physics/driver-heat";
import { dixonMood } from "@/lib/physics/evidence/dixon-mood";
import { clopperPearson, wilsonInterval } from "@/lib/physics/evidence/proportion";
import { reliabilityWithUniformPrior, trialsNeeded } from "@/lib/physics/evidence/success-run";
import { weightAlongAxis, weightTorque } from "@/lib/physics/gravity";
import { accelerationTorque, forceTorque, reflectedInertia } from "@/lib/physics/load-torque";
import { firstMicrostepShare, lowestCurrent } from "@/lib/physics/microstep-fidelity";
import { copperFactor, windingPower, windingSteadyState } from "@/lib/physics/motor-heat";
import { peakSpeed, travelToReach } from "@/lib/physics/profiles";
import { conservativePullOut, generatedVoltage, voltageConstant } from "@/lib/physics/pull-out";
import { naturalFrequency } from "@/lib/physics/resonance";
import { senseResistorPower } from "@/lib/physics/sense-resistor";
import {
  digitalScaleCurrent,
  referenceVoltageCurrent,
  transconductanceCurrent,
} from "@/lib/physics/set-point";
import { speedJumpBound } from "@/lib/physics/start-stop";
import { holdingTorqueAt } from "@/lib/physics/static-torque";
import { fullStepRate, pulseRateLimit, stepRate } from "@/lib/physics/step-rate";
import { kineticEnergy, voltageAfterBraking } from "@/lib/physics/supply";
import { ROWS } from "./rows";
import type { PublishedRow } from "./rows";

type Numbers = Readonly<Record<string, number>>;
type Results = Readonly<Record<string, number | boolean>>;

/** What this project computes for a row, by the names of the row's expectations. */
const CALCULATIONS: Readonly<Record<string, (inputs: Numbers) => Results>> = {
  setpoint_scale: ({ cs, vfs_v, rs_ohm, rint_ohm = 0, globalscaler = 256 }) => {
    const i_peak_a = digitalScaleCurrent({
      scale: cs!,
      steps: 32,
      overallScale: globalscaler / 256,
      fullScaleVoltage: vfs_v!,
      senseResistance: rs_ohm!,
      internalResistance: rint_ohm,
    });
    return { i_peak_a, i_rms_a: rmsFromPeak(i_peak_a) };
  },
  setpoint_gain: ({ vref_v, gain_a_per_v }) => ({
    i_peak_a: transconductanceCurrent({ referenceVoltage: vref_v!, amperesPerVolt: gain_a_per_v! }),
  }),
  setpoint_vref: ({ vref_v, k, rs_ohm }) => {
    const i_peak_a = referenceVoltageCurrent({
      referenceVoltage: vref_v!,
      gain: k!,
      senseResistance: rs_ohm!,
    });
    return { i_peak_a, i_rms_a: rmsFromPeak(i_peak_a) };
  },
  driver_heat: ({ i_a, rds_total_ohm, ta_c = 25, rth_ja = 0 }) => {
    const conduction = conductionLoss({ current: i_a!, onResistance: rds_total_ohm! });
    const settled = driverSteadyState({
      conduction,
      conductionAt: 25,
      constant: 0,
      thermalResistance: rth_ja,
      ambient: ta_c,
    });
    return { p_cond_w: settled?.power ?? Infinity, runaway: settled === null };
  },
  sense_power: ({ i_rms_a, rs_ohm, rated_w }) => ({
    ratio: senseResistorPower({ peakCurrent: peakFromRms(i_rms_a!), resistance: rs_ohm! }) / rated_w!,
  }),
  copper_alpha: ({ t_ref_c }) => ({
    alpha_per_k: (copperFactor(t_ref_c! + 1) - copperFactor(t_ref_c!)) / copperFactor(t_ref_c!),
  }),
  copper_factor: ({ t_c }) => ({ kt: 1 / copperFactor(t_c!) }),
  winding_power: ({ i_rms_a, r20_ohm, t_c }) => ({
    r_ohm: r20_ohm! * copperFactor(t_c!),
    p_w: windingPower({ current: i_rms_a!, resistanceAt20: r20_ohm!, temperature: t_c! }),
  }),
  motor_steady: ({ i_rms_a, r20_ohm, rth_k_per_w, ta_c }) => {
    const settled = windingSteadyState({
      current: i_rms_a!,
      resistanceAt20: r20_ohm!,
      thermalResistance: rth_k_per_w!,
      ambient: ta_c!,
    });
    return { t_c: settled!.temperature, p_w: settled!.power };
  },
  microstep_torque: ({ n }) => ({ percent: 100 * firstMicrostepShare(n!) }),
  ke_from_holding: ({ th_nm, i_rated_a }) => {
    const ke = voltageConstant(th_nm!, i_rated_a!);
    return {
      ke_v_s_per_rad: ke,
      ke_v_per_krpm: generatedVoltage(ke, (1000 * 2 * Math.PI) / 60),
      ke_rms_v_s_per_rad: rmsFromPeak(ke),
    };
  },
  generated_voltage: ({ ke_v_s_per_rad, speed_rpm }) => ({
    v_peak: generatedVoltage(ke_v_s_per_rad!, (speed_rpm! * 2 * Math.PI) / 60),
  }),
  inertia_linear: ({ mass_kg, travel_m_per_rev }) => ({
    j_kgm2: reflectedInertia(mass_kg!, travel_m_per_rev! / (2 * Math.PI)),
  }),
  accel_torque: ({ j_kgm2, alpha, dspeed_rad_s, dt_s }) => ({
    t_nm: accelerationTorque(j_kgm2!, alpha ?? dspeed_rad_s! / dt_s!),
  }),
  belt_torque: ({ force_n, radius_m, teeth, pitch_m }) => {
    const radius = radius_m ?? (teeth! * pitch_m!) / (2 * Math.PI);
    return { radius_m: radius, t_nm: forceTorque({ force: force_n!, radius, efficiency: 1 }) };
  },
  screw_torque: ({ force_n, lead_m, eta }) => ({
    t_nm: forceTorque({ force: force_n!, radius: lead_m! / (2 * Math.PI), efficiency: eta! }),
  }),
  speed_jump: ({ th_nm, nr, j_kgm2, tl_nm = 0 }) => {
    const jump = speedJumpBound({ torque: th_nm!, loadTorque: tl_nm, inertia: j_kgm2!, rotorTeeth: nr! });
    return { limit_rad_s: jump, limit_full_steps_s: fullStepRate(jump, 90 / nr!) };
  },
  natural_freq: ({ stiffness, j_kgm2 }) => {
    const f_hz = naturalFrequency(stiffness!, j_kgm2!);
    return { f_hz, w_rad_s: 2 * Math.PI * f_hz };
  },
  trapezoid: ({ dist, v, a }) => {
    const v_peak = peakSpeed({ speed: v!, acceleration: a!, travel: dist! });
    return { v_peak, reached: v_peak === v, d_to_reach: travelToReach(v!, a!) };
  },
  steps_per_unit: ({ full_steps, microsteps, lead }) => ({
    steps_per_unit: stepsPerTravel({
      stepAngleDeg: 360 / full_steps!,
      microsteps: microsteps!,
      travelPerTurn: lead!,
    }),
  }),
  step_rate: ({ steps_per_mm, v_mm_s, t_high_s = 0, t_low_s = 0 }) => {
    const f_hz = stepRate(v_mm_s!, steps_per_mm!);
    const limit_hz = pulseRateLimit(t_high_s, t_low_s);
    return { f_hz, limit_hz, ok: f_hz <= limit_hz };
  },
  min_current: ({ t_blank_s, f_chop_hz, v_v, r_ohm }) => ({
    i_min_a: lowestCurrent({ onTime: t_blank_s!, frequency: f_chop_hz!, voltage: v_v!, resistance: r_ohm! }),
  }),
  bus_pump: ({ v0_v, c_f, m_kg, v_m_s }) => {
    const e_j = kineticEnergy(m_kg!, v_m_s!);
    return { e_j, v_bus_v: voltageAfterBraking({ voltage: v0_v!, energy: e_j, capacitance: c_f! }) };
  },
  gravity_hold: ({ mass_kg, lead_m, th_nm, i_rated_a, i_hold_a }) => {
    const weight = weightAlongAxis({ mass: mass_kg!, inclineDeg: 90, counterbalance: 0 });
    const t_gravity_nm = weightTorque({ weight, radius: lead_m! / (2 * Math.PI), motors: 1 });
    const t_hold_nm = holdingTorqueAt({
      holdingTorque: th_nm!,
      current: i_hold_a!,
      ratedCurrent: i_rated_a!,
    });
    return { t_gravity_nm, t_hold_nm, ok: t_hold_nm >= 2 * t_gravity_nm };
  },
  success_run: ({ reliability, confidence, n }): Results =>
    n === undefined
      ? { n: trialsNeeded({ reliability: reliability!, confidence: confidence! })! }
      : { reliability: reliabilityWithUniformPrior({ trials: n, failures: 0, confidence: confidence! }) },
  trials_with_failures: ({ reliability, confidence, failures }) => ({
    n: trialsNeeded({ reliability: reliability!, confidence: confidence!, failures: failures! })!,
  }),
  wilson: ({ k, n, z }) => ({ ...wilsonInterval(k!, n!, z!) }),
  clopper_pearson: ({ k, n }) => ({ ...clopperPearson(k!, n!, 0.95) }),
};

/** Levels and outcomes of a ladder as a row writes them, as rungs counted from the lowest level tested. */
function ladderOf({ inputs: { levels, failed, step } }: PublishedRow) {
  const heights = String(levels).split(" ").map(Number);
  const outcomes = String(failed).split(" ");
  const start = Math.min(...heights);
  const trials = heights.map((level, index) => ({
    rung: (level - start) / Number(step),
    failed: outcomes[index] === "1",
  }));
  return { shape: { start, step: Number(step), fails: "above" as const }, trials };
}

function dixonMoodOf(row: PublishedRow): Results {
  const { shape, trials } = ladderOf(row);
  const found = dixonMood(shape, trials)!;
  const { events: n, q, mean, deviation: sd, deviationReliable: sd_reliable } = found;
  return { n, q, mean, sd, sd_reliable };
}

/** What a row expects of more than this project computes: the times of a move. */
const NOT_COMPUTED = new Set(["t_total"]);

interface Deviation {
  count: number;
  largest: number;
}
const deviations = new Map<string, Deviation>();

function note(topic: string, deviation: number): void {
  const found = deviations.get(topic) ?? { count: 0, largest: 0 };
  deviations.set(topic, { count: found.count + 1, largest: Math.max(found.largest, deviation) });
}

function numbers({ inputs }: PublishedRow): Numbers {
  return Object.fromEntries(
    Object.entries(inputs).filter((entry): entry is [string, number] => typeof entry[1] === "number"),
  );
}

function compare(row: PublishedRow, results: Results): void {
  for (const [name, expected] of Object.entries(row.expected)) {
    if (NOT_COMPUTED.has(name)) continue;
    const computed = results[name];
    if (typeof expected === "boolean") {
      expect(computed, name).toBe(expected);
      note(row.topic, 0);
      continue;
    }
    const { rel = 0, abs = 0 } = row.tolerance;
    const allowed = Math.max(rel * Math.abs(expected), abs);
    expect(
      Math.abs(Number(computed) - expected),
      `${name}: ${computed} against ${expected}`,
    ).toBeLessThanOrEqual(allowed);
    note(row.topic, expected === 0 ? Math.abs(Number(computed)) : Math.abs(Number(computed) / expected - 1));
  }
}

const SIMULATED = ROWS.filter(({ calc }) => calc === "pullout");
const COMPUTED = ROWS.filter(({ calc }) => calc !== "pullout");

describe("published values", () => {
  it.each(COMPUTED.map(({ id, topic, confirmed, source }) => [id, topic, confirmed, source]))(
    "%s (%s, %s): %s",
    (id) => {
      const row = COMPUTED.find((one) => one.id === id)!;
      compare(row, row.calc === "dixon_mood" ? dixonMoodOf(row) : CALCULATIONS[row.calc]!(numbers(row)));
    },
  );

  it("holds at least 30 rows", () => {
    expect(COMPUTED.length).toBeGreaterThanOrEqual(30);
  });
});

describe("pull-out beside a simulation of the phase equations", () => {
  // Source: independent time-domain simulation of the two phases (derived); the conservative form lies below it.
  it.each(SIMULATED.map(({ id }) => id))("%s: conservative by 0 to 26 %%", (id) => {
    const row = SIMULATED.find((one) => one.id === id)!;
    const { v_v, r_ohm, l_h, th_nm, i_rated_a, nr, i_rms_a, speed_rpm } = numbers(row);
    const torque = conservativePullOut(
      {
        voltage: v_v!,
        resistance: r_ohm!,
        inductance: l_h!,
        voltageConstant: voltageConstant(th_nm!, i_rated_a!),
        rotorTeeth: nr!,
        peakCurrent: peakFromRms(i_rms_a!),
      },
      (speed_rpm! * 2 * Math.PI) / 60,
    );
    const share = torque / Number(row.expected.t_expected_nm);
    expect(share).toBeLessThanOrEqual(1);
    expect(share).toBeGreaterThanOrEqual(0.74);
  });
});

afterAll(() => {
  const lines = [...deviations].map(
    ([topic, { count, largest }]) =>
      `${topic.padEnd(26)} ${String(count).padStart(3)} values, largest deviation ${(100 * largest).toFixed(3)} %`,
  );
  console.log(["Published values against lib/physics:", ...lines].join("\n"));
});
