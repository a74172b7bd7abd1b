/** A two-phase motor that slips falls back into step one electrical turn on: four full steps. */
export const STEPS_OF_A_SLIP = 4;

export interface MeasuredDeviation {
  /** Full steps by which the axis stands off its place after the reference run; signed. */
  readonly fullSteps: number;
  /** What the reference and the measuring alone scatter by, full steps ≥ 0; null where nobody has measured it. */
  readonly repeatability: number | null;
  /** Full steps that one belt tooth moves; null on other drive trains or where it is not known. */
  readonly toothSteps: number | null;
}

export interface LostSteps {
  /** The nearest multiple of four full steps, signed. */
  readonly lost: number;
  /** What is left, full steps from −2 to 2. */
  readonly remainder: number;
  /**
   * `none`: within the repeatability, nothing is lost. `lost`: whole slips and a remainder within the repeatability.
   * `unexplained`: a remainder that lost steps do not explain. `open`: without a repeatability the remainder cannot be
   * judged.
   */
  readonly verdict: "none" | "lost" | "unexplained" | "open";
  /** Belt teeth, signed, that would explain the deviation as well; null where they do not. */
  readonly teeth: number | null;
}

/** Full steps within which numbers typed from a scale count as equal where no repeatability is known. */
const TYPED = 0.05;

/**
 * Lost-step arithmetic, all in full steps: the deviation as a multiple of four and a remainder. The remainder is the
 * reference's repeatability, backlash, or a slipped coupling or belt tooth, never lost steps.
 * Source: a rotor has a stable place every 360° electrical, four full steps of a two-phase motor (Acarnley).
 */
export function lostSteps({ fullSteps, repeatability, toothSteps }: MeasuredDeviation): LostSteps {
  const slips = Math.round(fullSteps / STEPS_OF_A_SLIP);
  // Adding 0 keeps −0 from the page.
  const lost = slips * STEPS_OF_A_SLIP + 0;
  // A deviation read in mm is no whole number of steps to the last digit.
  const remainder = Math.round((fullSteps - lost) * 1e9) / 1e9 + 0;
  return {
    lost,
    remainder,
    verdict: verdictOf({ fullSteps, lost, remainder, repeatability }),
    teeth: teethOf({ fullSteps, repeatability, toothSteps }),
  };
}

interface Judged {
  readonly fullSteps: number;
  readonly lost: number;
  readonly remainder: number;
  readonly repeatability: number | null;
}

function verdictOf({ fullSteps, lost, remainder, repeatability }: Judged): LostSteps["verdict"] {
  if (fullSteps === 0) return "none";
  if (repeatability === null) return lost !== 0 && Math.abs(remainder) <= TYPED ? "lost" : "open";
  if (Math.abs(fullSteps) <= repeatability) return "none";
  return lost !== 0 && Math.abs(remainder) <= repeatability ? "lost" : "unexplained";
}

function teethOf({ fullSteps, repeatability, toothSteps }: MeasuredDeviation): number | null {
  if (toothSteps === null || toothSteps <= 0) return null;
  const teeth = Math.round(fullSteps / toothSteps);
  const apart = Math.abs(fullSteps - teeth * toothSteps);
  return teeth !== 0 && apart <= Math.max(repeatability ?? 0, TYPED) ? teeth : null;
}
