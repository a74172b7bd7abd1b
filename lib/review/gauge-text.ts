import { LEVEL_WORDS, type Level } from "@/lib/domain/levels";
import { showText } from "@/lib/domain/units";
import {
  gaugeMark,
  gaugePlace,
  gaugeScale,
  gaugeUse,
  type GaugeReading,
  type GaugeScale,
} from "./gauge-scale";

export interface GaugeTextInput {
  readonly reading: GaugeReading;
  readonly unit: string;
  readonly level: Level;
  /** Left out: a scale of its own. */
  readonly scale?: GaugeScale | undefined;
  /** Characters between the two ends. */
  readonly cells?: number | undefined;
}

/** "64 °C, was 51 °C, limit at most 58 °C: over limit". Values in `unit`, shown as on a page. */
export function gaugeWords({ reading, unit, level }: Omit<GaugeTextInput, "scale" | "cells">): string {
  const mark = gaugeMark(reading);
  const parts = [reading.value === null ? "no value" : showText(reading.value, unit)];
  if (typeof reading.before === "number") parts.push(`was ${showText(reading.before, unit)}`);
  if (mark !== null) parts.push(markWords(reading, showText(mark, unit)));
  return `${parts.join(", ")}: ${LEVEL_WORDS[level]}`;
}

function markWords(reading: GaugeReading, shown: string): string {
  if (reading.limit === null) return `${reading.sense === "lower" ? "near below" : "near above"} ${shown}`;
  return `limit ${reading.sense === "lower" ? "at least" : "at most"} ${shown}`;
}

/** Cell of a use on a row of `cells`; a value that is not beyond the limit never lands on or behind its sign, and the other way round. */
function cellOf(use: number, scale: GaugeScale, cells: number): number {
  const limit = Math.round(gaugePlace(1, scale).at * (cells - 1));
  const cell = Math.round(gaugePlace(use, scale).at * (cells - 1));
  return use > 1 ? Math.max(cell, limit + 1) : Math.min(cell, limit - 1);
}

function emptyRow(reading: GaugeReading, scale: GaugeScale, cells: number): string[] {
  const limit = cellOf(1, scale, cells) + 1;
  const near = gaugeUse(reading.nearLimit ?? Number.NaN, reading) ?? 1;
  const nearCell = Math.min(Math.round(gaugePlace(near, scale).at * (cells - 1)), limit);
  const isOver = reading.limit !== null;
  return Array.from({ length: cells }, (_, cell) => {
    if (cell >= limit) return isOver ? (cell === limit ? "#" : "/") : "=";
    return cell >= nearCell ? "=" : "-";
  });
}

/**
 * The gauge in plain characters for e-mails, e.g. `[----o--*-==#///]`: `o` the value before, `*` the value now,
 * `#` the limit, a slash beyond it, `=` near it, `<` and `>` a value off the end. Null where there is nothing to draw.
 */
export function gaugeDrawing({
  reading,
  scale,
  cells = 24,
}: Omit<GaugeTextInput, "unit" | "level">): string | null {
  const mark = gaugeMark(reading);
  if (mark === null || mark === 0 || reading.value === null) return null;
  const used = scale ?? gaugeScale([reading]);
  const row = emptyRow(reading, used, cells);
  const signs: [number | null | undefined, string][] = [
    [reading.before, "o"],
    [reading.value, "*"],
  ];
  for (const [value, sign] of signs) {
    const use = typeof value === "number" ? gaugeUse(value, reading) : null;
    if (use === null) continue;
    const { beyond } = gaugePlace(use, used);
    row[cellOf(use, used, cells)] = beyond === null ? sign : beyond === "low" ? "<" : ">";
  }
  return `[${row.join("")}]`;
}

/** Drawing and words in one line; the words alone where there is nothing to draw. */
export function gaugeText(input: GaugeTextInput): string {
  const drawing = gaugeDrawing(input);
  const words = gaugeWords(input);
  return drawing === null ? words : `${drawing} ${words}`;
}
