import type { ParameterName } from "@/lib/domain/parameters";
import { joinWords, plural } from "@/lib/domain/sentences";
import type { ParameterValue } from "@/lib/domain/values";
import { axisWord, onAxis } from "./axis-word";
import { lowerLabel } from "./drift-sentence";
import type { DriftItem } from "./drift-types";

interface Unknown {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  /** Null: never read. */
  readonly staleDays: number | null;
}

/** "Z hold current not read", or "… not read for 40 days". */
export function unknownSentence({ axis, parameter, staleDays }: Unknown): string {
  return onAxis(axis, `${lowerLabel(parameter)} ${notRead(staleDays)}`);
}

function notRead(staleDays: number | null): string {
  return staleDays === null ? "not read" : `not read for ${staleDays} days`;
}

interface MachineInput {
  /** Gravest first. */
  readonly items: readonly DriftItem[];
  readonly required: readonly ParameterValue[];
}

/** The machine in one sentence: that of its gravest item, or what of it was not read, axis by axis. */
export function machineSentence({ items, required }: MachineInput): string {
  if (required.length === 0) return "no required value to compare with";
  const [worst] = items;
  if (!worst) return "on baseline";
  if (worst.kind === "differs") return worst.sentence;
  const alike = items.filter(({ kind }) => kind === worst.kind);
  const days = alike.map(({ staleDays }) => staleDays).filter((value) => value !== null);
  const words = notRead(days.length === 0 ? null : Math.max(...days));
  if (alike.length === required.length) return words;
  return `${placesOf(alike, required)} ${words}`;
}

/** "Y and Z" where nothing of these axes is known, "Z hold current", else "3 parameters of Z". */
function placesOf(items: readonly DriftItem[], required: readonly ParameterValue[]): string {
  const places = [...new Set(items.map(({ axis }) => axis))].map((axis) => {
    const own = items.filter((item) => item.axis === axis);
    if (axis !== null && own.length === required.filter((value) => value.axis === axis).length)
      return axisWord(axis);
    const [only] = own;
    if (only && own.length === 1) return onAxis(axis, lowerLabel(only.parameter, only.required));
    const count = plural(own.length, "parameter");
    return axis === null ? `${count} of the machine` : `${count} of ${axisWord(axis)}`;
  });
  return joinWords(places);
}
