/** A stretch of a move with constant jerk. Lengths in m (rad on a rotary axis). */
export interface ProfileSegment {
  /** s from the start of the move. */
  readonly start: number;
  /** s, more than 0. */
  readonly duration: number;
  /** m, at the start of the stretch; likewise the next two. */
  readonly position: number;
  /** m/s */
  readonly speed: number;
  /** m/s² */
  readonly acceleration: number;
  /** m/s³, over the whole stretch. */
  readonly jerk: number;
}

/** What a move commands over time, from rest to rest. */
export interface MoveProfile {
  readonly segments: readonly ProfileSegment[];
  /** s */
  readonly duration: number;
  /** m */
  readonly distance: number;
  /** Highest speed that is reached, m/s. */
  readonly peakSpeed: number;
  /** Highest acceleration that is reached, m/s². */
  readonly peakAcceleration: number;
}

interface Limits {
  /** m, more than 0. */
  readonly distance: number;
  /** m/s, more than 0. */
  readonly speed: number;
  /** m/s², more than 0. */
  readonly acceleration: number;
}

/**
 * Trapezoid from rest to rest: accelerates at a (m/s²) to min(v, √(a·d)), cruises, brakes at a; d in m, v in m/s, all
 * more than 0. d/v + v/a seconds where v is reached, else 2·√(d/a). Source: kinematics.
 */
export function trapezoidProfile({ distance, speed, acceleration }: Limits): MoveProfile {
  const peak = Math.min(speed, Math.sqrt(acceleration * distance));
  const ramp = peak / acceleration;
  const cruise = Math.max(0, distance / peak - ramp);
  return profileOf(
    [
      { duration: ramp, acceleration, jerk: 0 },
      { duration: cruise, acceleration: 0, jerk: 0 },
      { duration: ramp, acceleration: -acceleration, jerk: 0 },
    ],
    { distance, peakSpeed: peak, peakAcceleration: acceleration },
  );
}

/**
 * S-curve from rest to rest with jerk at most j (m/s³), acceleration at most a (m/s²), speed at most v (m/s), over d (m),
 * all more than 0. One ramp lasts v/a + a/j where v ≥ a²/j, else 2·√(v/j); where the ramps do not fit into d, the
 * highest speed follows from d alone. Source: kinematics.
 */
export function sCurveProfile({
  distance,
  speed,
  acceleration,
  jerk,
}: Limits & { readonly jerk: number }): MoveProfile {
  const peak = Math.min(speed, peakOfRamps({ distance, acceleration, jerk }));
  const rise = Math.min(acceleration / jerk, Math.sqrt(peak / jerk));
  const hold = Math.max(0, peak / (jerk * rise) - rise);
  const cruise = Math.max(0, distance / peak - (2 * rise + hold));
  const reached = jerk * rise;
  return profileOf(
    [
      { duration: rise, acceleration: 0, jerk },
      { duration: hold, acceleration: reached, jerk: 0 },
      { duration: rise, acceleration: reached, jerk: -jerk },
      { duration: cruise, acceleration: 0, jerk: 0 },
      { duration: rise, acceleration: 0, jerk: -jerk },
      { duration: hold, acceleration: -reached, jerk: 0 },
      { duration: rise, acceleration: -reached, jerk },
    ],
    { distance, peakSpeed: peak, peakAcceleration: reached },
  );
}

/** Commanded position (m), speed (m/s) and acceleration (m/s²) at a time, s; at rest before the start and after the end. */
export function profileAt(
  profile: MoveProfile,
  time: number,
): { position: number; speed: number; acceleration: number } {
  if (time >= profile.duration) return { position: profile.distance, speed: 0, acceleration: 0 };
  const segment = profile.segments.findLast(({ start }) => start <= time);
  return segment === undefined
    ? { position: 0, speed: 0, acceleration: 0 }
    : segmentAt(segment, time - segment.start);
}

/** Highest speed, m/s, of two ramps that fill the distance between them. */
function peakOfRamps({
  distance: d,
  acceleration: a,
  jerk: j,
}: Omit<Limits, "speed"> & { jerk: number }): number {
  const lag = a / j;
  const full = (a / 2) * (Math.sqrt(lag ** 2 + (4 * d) / a) - lag);
  return full >= a * lag ? full : Math.cbrt((d ** 2 * j) / 4);
}

function segmentAt({ position, speed, acceleration, jerk }: ProfileSegment, t: number) {
  return {
    position: position + t * (speed + t * (acceleration / 2 + (t * jerk) / 6)),
    speed: speed + t * (acceleration + (t * jerk) / 2),
    acceleration: acceleration + t * jerk,
  };
}

function profileOf(
  stretches: readonly Pick<ProfileSegment, "duration" | "acceleration" | "jerk">[],
  reached: Omit<MoveProfile, "segments" | "duration">,
): MoveProfile {
  const segments: ProfileSegment[] = [];
  let at = { start: 0, position: 0, speed: 0 };
  for (const stretch of stretches.filter(({ duration }) => duration > 0)) {
    const segment = { ...at, ...stretch };
    segments.push(segment);
    const { position, speed } = segmentAt(segment, stretch.duration);
    at = { start: at.start + stretch.duration, position, speed };
  }
  return { segments, duration: at.start, ...reached };
}
