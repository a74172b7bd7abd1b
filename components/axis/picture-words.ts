import type { AxisKind } from "@/lib/domain/axis-kind";
import { formatNumber, shownUnit } from "@/lib/domain/units";
import type { PlotAxis } from "@/components/charts/plot";

/** Inside units of an axis. */
export function axisUnits(kind: AxisKind) {
  const length = kind === "rotary" ? "rad" : "m";
  return { length, speed: `${length}/s`, acceleration: `${length}/s²` };
}

/** A scale from 0 in the unit that people read. */
export function scaleOf(title: string, inside: string, end: number): PlotAxis {
  const { unit, factor } = shownUnit(inside);
  return { title, unit, factor, start: 0, end };
}

/** A share of 1 in per cent. */
export function percent(share: number): string {
  return `${formatNumber(share * 100)} %`.replace("-", "\u2212");
}

/** Every nth place, so that a table of a picture has about `rows` rows; the first and the last are among them. */
export function someOf(count: number, rows: number): number[] {
  const last = count - 1;
  const steps = Math.min(last, rows);
  return [
    ...new Set(Array.from({ length: steps + 1 }, (_, row) => Math.round((last * row) / Math.max(1, steps)))),
  ];
}
