import type { FloorRow } from "@/lib/domain/floor";
import { plural } from "@/lib/domain/sentences";
import type { FloorCounts } from "@/lib/schemas/floor";

const DAY_MS = 86_400_000;
/** As many over-limit machines are named; the map shows the rest. */
const NAMED = 2;

/** "6 of 248 machines are off baseline, 1 not read" */
export function floorHeading({ inService, offBaseline, notRead }: FloorCounts): string {
  if (inService === 0) return "No machine is in service here";
  if (offBaseline === 0 && notRead === 0)
    return inService === 1 ? "The machine is on baseline" : `All ${inService} machines are on baseline`;
  const machines = plural(inService, "machine");
  if (offBaseline === 0) return `No machine is off baseline; ${notRead} of ${machines} not fully read`;
  const off = `${offBaseline} of ${machines} ${offBaseline === 1 ? "is" : "are"} off baseline`;
  return notRead === 0 ? off : `${off}, ${notRead} not read`;
}

/** What is gravest, and what ends soonest, in one line. */
export function floorSubtitle(counts: FloorCounts, rows: readonly FloorRow[], now: Date): string {
  const sentences = [overWords(counts, rows), deviationWords(counts, now), outWords(counts)];
  return sentences.filter((sentence) => sentence !== "").join(" ");
}

function overWords({ over }: FloorCounts, rows: readonly FloorRow[]): string {
  if (over === 0) return "None is over a limit.";
  const named = rows.filter(({ standing }) => standing === "over").slice(0, NAMED);
  const words = named.map(({ serial, sentence }) => `${serial} ${sentence}`).join("; ");
  return words === "" ? `${over} over limit.` : `${over} over limit: ${words}.`;
}

function deviationWords({ onDeviation, nextDeviationEnd }: FloorCounts, now: Date): string {
  if (onDeviation === 0) return "";
  const run = `${onDeviation} ${onDeviation === 1 ? "runs on a permitted deviation" : "run on permitted deviations"}`;
  if (nextDeviationEnd === null) return `${run}.`;
  const today = Date.parse(now.toISOString().slice(0, 10));
  const days = Math.round((Date.parse(nextDeviationEnd) - today) / DAY_MS);
  const when = days <= 0 ? "today" : `in ${plural(days, "day")}`;
  return `${run}, ${onDeviation === 1 ? "which ends" : "one ends"} ${when}.`;
}

function outWords({ outOfService }: FloorCounts): string {
  return outOfService === 0 ? "" : `${outOfService} out of service.`;
}
