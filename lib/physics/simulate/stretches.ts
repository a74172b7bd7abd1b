import type { ShaftModel } from "./axis";
import type { MoveProfile, ProfileSegment } from "./profile";

/** A part of the command with its own step, so that steps end where the command has its corners. */
export interface Stretch {
  readonly segment: ProfileSegment;
  readonly steps: number;
  /** s */
  readonly step: number;
}

/** s */
const SHORTEST_SETTLE = 0.05;
const LONGEST_SETTLE = 0.5;
/** Time constants of the swing: 2 % of it are left. */
const SETTLE_CONSTANTS = 4;

/** Time, s, after which the swing of the rotor has died down: 4/(ζ·ω_n), 0.05 s at least and 0.5 s at most. */
export function settleTime({ damping, naturalRate, torque, rotorTeeth }: ShaftModel): number {
  const decay = (damping * naturalRate ** 2) / (2 * rotorTeeth * torque);
  return Math.min(LONGEST_SETTLE, Math.max(SHORTEST_SETTLE, SETTLE_CONSTANTS / decay));
}

/** The stretches of a move and of the standstill behind it, each in equal steps of at most `size` seconds. */
export function stretchesOf(input: {
  readonly profile: MoveProfile;
  readonly settle: number;
  readonly size: number;
}): Stretch[] {
  const { profile, settle, size } = input;
  const rest: ProfileSegment = {
    start: profile.duration,
    duration: settle,
    position: profile.distance,
    speed: 0,
    acceleration: 0,
    jerk: 0,
  };
  return [...profile.segments, rest].map((segment) => {
    const steps = Math.max(1, Math.ceil(segment.duration / size));
    return { segment, steps, step: segment.duration / steps };
  });
}
