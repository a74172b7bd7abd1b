import type { AxisKind } from "@/lib/domain/axis-kind";
import { formatNumber, showText } from "@/lib/domain/units";
import { STEPS_PER_SLIP } from "@/lib/physics/simulate/outcome";
import type { MoveReport } from "./virtual-move";

interface Told {
  readonly report: MoveReport;
  readonly kind: AxisKind;
  /** Travel for one radian of the motor, m (rad). */
  readonly radius: number;
}

function speedText(speed: number, kind: AxisKind): string {
  return showText(speed, kind === "rotary" ? "rad/s" : "m/s");
}

function stepsText(fullSteps: number): string {
  return `${formatNumber(fullSteps, 2)} full steps`;
}

/** What became of the steps, in a sentence or two. */
export function verdictSentence({ report, kind }: Told): string {
  const { verdict, fullStepsLost, broke, largestLag } = report.outcome;
  if (verdict === "kept") {
    const edge =
      largestLag.fullSteps > STEPS_PER_SLIP / 2
        ? "That is past two full steps, where a rotor falls out of step: it came back, this time"
        : "Two full steps away it would fall out of step";
    return `The axis keeps step. Its rotor is at most ${stepsText(largestLag.fullSteps)} away from the command, ${showText(largestLag.time, "s")} after the start. ${edge}.`;
  }
  const where = broke
    ? ` The rotor falls out of step ${showText(broke.time, "s")} after the start, while ${speedText(broke.speed, kind)} are commanded.`
    : "";
  if (fullStepsLost === 0) return `The axis slips on its way and falls back into place by chance.${where}`;
  const count = Math.abs(fullStepsLost);
  return `The axis ends ${count} full steps ${fullStepsLost > 0 ? "short of" : "beyond"} the command, ${count / STEPS_PER_SLIP} times four.${where}`;
}

/** How strongly the rotor swings, beside its natural frequency. */
export function swingSentence({ report, kind, radius }: Told): string {
  const { swing, naturalFrequency, couplingFrequency } = report;
  const rotor = `The rotor with its load swings freely at ${showText(naturalFrequency, "Hz")}`;
  const load =
    couplingFrequency === null
      ? ""
      : `, the load on its belt or screw at ${showText(couplingFrequency, "Hz")}`;
  if (swing === null) return `${rotor}${load}. The move is too short to tell a swing.`;
  const at = swing.frequency === null ? "" : ` at ${showText(swing.frequency, "Hz")}`;
  const speed = speedText(swing.shaftSpeed * radius, kind);
  return `${rotor}${load}. The strongest swing in this move is ±${stepsText(swing.fullSteps)}${at}, ${showText(swing.time, "s")} after the start, while ${speed} are commanded.`;
}

/** Whether the supply could drive the set current. */
export function voltageSentence({ report }: Told): string {
  const share = report.outcome.shortOfVoltage;
  if (share === 0) return "The supply drives the set current all the time.";
  return `The supply cannot drive the set current for ${formatNumber(share * 100, 2)} % of the time.`;
}
