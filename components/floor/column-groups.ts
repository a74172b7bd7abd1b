import type { FloorColumn } from "@/lib/domain/floor";

export interface ColumnGroup {
  readonly axis: string | null;
  /** Index of its first column among the parameter columns, from 0. */
  readonly start: number;
  readonly count: number;
}

/** Runs of columns of one axis. */
export function columnGroups(columns: readonly FloorColumn[]): ColumnGroup[] {
  const groups: { axis: string | null; start: number; count: number }[] = [];
  columns.forEach(({ axis }, index) => {
    const last = groups.at(-1);
    if (last && last.axis === axis) last.count += 1;
    else groups.push({ axis, start: index, count: 1 });
  });
  return groups;
}

/** Columns before the parameters: machine, model, sentence. */
export const LEADING_COLUMNS = 3;

/** Pixels: widths of the leading columns, of a parameter column, and the gap before each axis. */
export const WIDTHS = { leading: [104, 136, 272], parameter: 31, gap: 18 } as const;

/** Grid tracks of every row in pixels, the gap before each axis inside its first column, and their sum. */
export function tracksOf(columns: readonly FloorColumn[]): { template: string; width: number } {
  const starts = new Set(columnGroups(columns).map(({ start }) => start));
  const tracks = [
    ...WIDTHS.leading,
    ...columns.map((_, index) => (starts.has(index) ? WIDTHS.gap + WIDTHS.parameter : WIDTHS.parameter)),
  ];
  return {
    template: tracks.map((track) => `${track}px`).join(" "),
    width: tracks.reduce<number>((sum, track) => sum + track, 0),
  };
}
