import * as m from "./integrate";
import { profileAt, type MoveProfile } from "./profile";

/** Full steps of one electrical turn: what a rotor slips by. */
export const STEPS_PER_SLIP = 4;

const TURN = 2 * Math.PI;

/** Full steps of an electrical angle, rad. */
export function fullSteps(electrical: number): number {
  return (electrical * STEPS_PER_SLIP) / TURN;
}

export interface MoveOutcome {
  /** Lost where the rotor slipped by four full steps or more, even if it fell back into place later. */
  readonly verdict: "kept" | "lost";
  /** Full steps that the rotor stands short of the command at the end, a multiple of four; negative where beyond it. */
  readonly fullStepsLost: number;
  /** s at which the lag passed two full steps for good, and the speed commanded then, m/s; null where kept. */
  readonly broke: { readonly time: number; readonly speed: number } | null;
  /** Largest lag, full steps without sign, and when, s. */
  readonly largestLag: { readonly fullSteps: number; readonly time: number };
  /** Lag at the end beside the lost steps, full steps. */
  readonly restLag: number;
  /** Share of the time in which the supply could not drive the current that was asked for. */
  readonly shortOfVoltage: number;
  /** s, of the move and of all that was simulated. */
  readonly moveTime: number;
  readonly time: number;
}

/** What came of a run whose memory stands at its end. */
export function outcomeOf(memory: Float64Array, profile: MoveProfile): MoveOutcome {
  const { at } = m;
  const time = m.timeOf(memory);
  const lag = m.lagOf(memory);
  // A lag of −0.2 turns rounds to −0, which is no number of steps.
  const slips = Math.round(lag / TURN) + 0;
  const largest = at(memory, m.LARGEST_LAG);
  const lost = slips !== 0 || largest >= TURN;
  const broke = at(memory, m.BROKE_TIME);
  return {
    verdict: lost ? "lost" : "kept",
    fullStepsLost: STEPS_PER_SLIP * slips,
    broke: lost && broke >= 0 ? { time: broke, speed: profileAt(profile, broke).speed } : null,
    largestLag: { fullSteps: fullSteps(largest), time: at(memory, m.LARGEST_LAG_TIME) },
    restLag: fullSteps(lag - slips * TURN),
    shortOfVoltage: at(memory, m.SHORT_TIME) / time,
    moveTime: profile.duration,
    time,
  };
}
