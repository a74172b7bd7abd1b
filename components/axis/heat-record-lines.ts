import type { HeatReading } from "@/lib/physics/heating-record";
import { readTypedNumber } from "@/lib/schemas/typed-number";

export type HeatRecord =
  | { readonly ok: true; readonly readings: readonly HeatReading[] }
  | { readonly ok: false; readonly sentence: string };

/** A heating record as typed, one reading a line: minutes, then °C. Empty lines are passed over. */
export function heatRecordOf(typed: string): HeatRecord {
  const readings: HeatReading[] = [];
  for (const [index, line] of typed.split("\n").entries()) {
    if (line.trim() === "") continue;
    const reading = readingOf(line.trim().split(/[\s;]+/));
    if (reading === null)
      return {
        ok: false,
        sentence: `Line ${index + 1} is not a time and a temperature. Write for example “10 41.5”: 10 min, 41.5 °C.`,
      };
    readings.push(reading);
  }
  return { ok: true, readings };
}

function readingOf(words: readonly string[]): HeatReading | null {
  const [minutes, celsius] = words.map(numberOf);
  if (words.length !== 2 || minutes === undefined || celsius === undefined || minutes < 0) return null;
  return { time: minutes * 60, temperature: celsius };
}

function numberOf(typed: string): number | undefined {
  const read = readTypedNumber(typed);
  return read.ok ? read.value : undefined;
}
