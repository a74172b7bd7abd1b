import { connectionFactors, peakFromRms, rmsFromPeak } from "@/lib/physics/current-conventions";
import type { Connection } from "@/lib/physics/current-conventions";
import { stepsPerTravel } from "@/lib/physics/drive-train";
import { conductionLoss, driverSteadyState } from "@/lib/physics/driver-heat";
import { dixonMood } from "@/lib/physics/evidence/dixon-mood";
import { clopperPearson, wilsonInterval } from "@/lib/physics/evidence/proportion";
import { reliabilityWithUniformPrior, trialsNeeded } from "@/lib/physics/evidence/success-run";
import { weightAlongAxis, weightTorque } from "@/lib/physics/gravity";
import {
  accelerationTorque,
  dutyTorque,
  forceTorque,
  opposingForce,
  reflectedInertia,
} from "@/lib/physics/load-torque";
import { firstMicrostepShare, lowestCurrent } from "@/lib/physics/microstep-fidelity";
import {
  copperFactor,
  windingPower,
  windingSteadyState,
  windingTemperatureByResistance,
} from "@/lib/physics/motor-heat";
import { peakSpeed, travelToReach, trapezoidTimes } from "@/lib/physics/profiles";
import { expectedPullOut, generatedVoltage, voltageConstant } from "@/lib/physics/pull-out";
import { beltStiffness, naturalFrequency } from "@/lib/physics/resonance";
import { senseResistorPower } from "@/lib/physics/sense-resistor";
import {
  digitalScaleCurrent,
  referenceVoltageCurrent,
  transconductanceCurrent,
} from "@/lib/physics/set-point";
import { speedJumpBound } from "@/lib/physics/start-stop";
import { holdingTorqueAt, SUDDEN_LOAD_SHARE } from "@/lib/physics/static-torque";
import { fullStepRate, pulseRateLimit, stepRate } from "@/lib/physics/step-rate";
import {
  cableDrop,
  inductanceRuleVoltage,
  kineticEnergy,
  supplyLoad,
  voltageAfterBraking,
} from "@/lib/physics/supply";

import type { PublishedRow } from "./rows";

/** Inputs of a row that are words or yes and no. */
type Words = Readonly<Record<string, number | string | boolean>>;

type Numbers = Readonly<Record<string, number>>;
export type Results = Readonly<Record<string, number | boolean>>;

/** What this project computes for a row, by the names of the row's expectations. */
const CALCULATIONS: Readonly<Record<string, (inputs: Numbers, words: Words) => Results>> = {
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
    const times = trapezoidTimes({ speed: v!, acceleration: a!, travel: dist! });
    return {
      v_peak,
      reached: v_peak === v,
      d_to_reach: travelToReach(v!, a!),
      t_acc: times.accelerating,
      t_cruise: times.cruising,
      t_total: times.total,
    };
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
  winding_config: ({ i_a, r_ohm = 1, l_h = 1 }, { config }) => {
    const { current, resistance, inductance } = connectionFactors(
      config === "half" ? "half_coil" : (config as Connection),
    );
    const i_rms_a = current * i_a!;
    return {
      i_rms_a,
      i_peak_a: peakFromRms(i_rms_a),
      r_ohm: resistance * r_ohm,
      l_h: inductance * l_h,
    };
  },
  scale_for_current: ({ i_rms_a, vfs_v, rs_ohm, rint_ohm }) => {
    const rms = (scale: number) =>
      rmsFromPeak(
        digitalScaleCurrent({
          scale,
          steps: 32,
          overallScale: 1,
          fullScaleVoltage: vfs_v!,
          senseResistance: rs_ohm!,
          internalResistance: rint_ohm!,
        }),
      );
    const scales = Array.from({ length: 32 }, (_, scale) => scale);
    return { cs: scales.filter((scale) => rms(scale) <= i_rms_a!).at(-1)!, full_scale_rms_a: rms(31) };
  },
  winding_temp: ({ r_cold_ohm, t_cold_c, r_hot_ohm }) => {
    const t_hot_c = windingTemperatureByResistance({ cold: r_cold_ohm!, coldAt: t_cold_c!, hot: r_hot_ohm! });
    return { t_hot_c, rise_k: t_hot_c - t_cold_c! };
  },
  step_load_limit: () => ({ ratio: SUDDEN_LOAD_SHARE, min_margin: 1 / SUDDEN_LOAD_SHARE }),
  rms_torque: ({ t1_nm, t2_nm, t3_nm, t4_nm, t1_s, t2_s, t3_s, t4_s }) => ({
    t_rms: dutyTorque([
      { torque: t1_nm!, time: t1_s! },
      { torque: t2_nm!, time: t2_s! },
      { torque: t3_nm!, time: t3_s! },
      { torque: t4_nm!, time: t4_s! },
    ]),
  }),
  axial_force: ({ mass_kg, mu, f_ext_n, g }) => ({
    f_n: opposingForce({ friction: mu! * mass_kg! * g!, external: f_ext_n!, weight: 0 }),
  }),
  belt_axis: ({ csp_n, width_m, span1_m, span2_m, mass_kg }) => {
    const k_n_per_m = beltStiffness({ specific: csp_n!, width: width_m!, spans: [span1_m!, span2_m!] });
    return { k_n_per_m, f_hz: naturalFrequency(k_n_per_m, mass_kg!) };
  },
  cable_drop: ({ ohm_per_km, length_m, i_a, t_c = 20 }) => {
    const v_drop = cableDrop({ length: length_m!, ohmPerKm: ohm_per_km!, current: i_a!, temperature: t_c });
    return { v_drop, r_loop_ohm: v_drop / i_a! };
  },
  supply_rule: ({ l_mh }) => ({ v_v: inductanceRuleVoltage(l_mh!) }),
  psu_power: ({ motors, i_rms_a, r_ohm, eff, derate }) => {
    const copper = motors! * windingPower({ current: i_rms_a!, resistanceAt20: r_ohm!, temperature: 20 });
    const p_load_w = supplyLoad({ copper, drivers: 0, mechanical: 0, other: 0, efficiency: eff! });
    return { p_load_w, p_psu_w: p_load_w / derate! };
  },
  pullout: ({ v_v, r_ohm, l_h, th_nm, i_rated_a, nr, i_rms_a, speed_rpm }) => {
    const motor = {
      voltage: v_v!,
      resistance: r_ohm!,
      inductance: l_h!,
      voltageConstant: voltageConstant(th_nm!, i_rated_a!),
      rotorTeeth: nr!,
      peakCurrent: peakFromRms(i_rms_a!),
    };
    const speed = (speed_rpm! * 2 * Math.PI) / 60;
    return { t_expected_nm: expectedPullOut(motor, speed) };
  },
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

function numbers({ inputs }: PublishedRow): Numbers {
  return Object.fromEntries(
    Object.entries(inputs).filter((entry): entry is [string, number] => typeof entry[1] === "number"),
  );
}

/** What this project computes for a row. */
export function computedFor(row: PublishedRow): Results {
  if (row.calc === "dixon_mood") return dixonMoodOf(row);
  const calculate = CALCULATIONS[row.calc];
  if (!calculate) throw new Error(`No calculation for ${row.id}`);
  return calculate(numbers(row), row.inputs);
}
