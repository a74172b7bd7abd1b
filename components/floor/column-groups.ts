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

export interface FloorLayout {
  readonly groups: readonly ColumnGroup[];
  /** Parameter columns that open an axis, by index. */
  readonly opens: ReadonlySet<number>;
  /** Widths of every column in pixels; the gap before an axis lies inside its first column. */
  readonly tracks: readonly number[];
  readonly width: number;
}

/** Where the columns of the map stand. */
export function floorLayout(columns: readonly FloorColumn[]): FloorLayout {
  const groups = columnGroups(columns);
  const opens = new Set(groups.map(({ start }) => start));
  const tracks = [
    ...WIDTHS.leading,
    ...columns.map((_, index) => (opens.has(index) ? WIDTHS.gap + WIDTHS.parameter : WIDTHS.parameter)),
  ];
  return { groups, opens, tracks, width: tracks.reduce<number>((sum, track) => sum + track, 0) };
}

/** Axes that end beyond `right` pixels from the left of a row, with where each begins. */
export function groupsBeyond(
  right: number,
  { groups, tracks }: FloorLayout,
): (ColumnGroup & { left: number })[] {
  const widthTo = (column: number): number => tracks.slice(0, column).reduce((sum, track) => sum + track, 0);
  return groups
    .map((group) => ({ ...group, left: widthTo(LEADING_COLUMNS + group.start) }))
    .filter(({ start, count }) => widthTo(LEADING_COLUMNS + start + count) > right + 1);
}

/** The column at `x` pixels from the left of a row, leading columns included; the last one beyond them all. */
export function columnAt(x: number, tracks: readonly number[]): number {
  let right = 0;
  const found = tracks.findIndex((track) => (right += track) > x);
  return found < 0 ? tracks.length - 1 : found;
}
