import type { FloorCell, FloorColumn, FloorRow } from "@/lib/domain/floor";
import { LEVEL_WORDS } from "@/lib/domain/levels";
import { axisWord } from "@/lib/review/axis-word";

/** "X run current", "Supply voltage" */
export function columnWords({ axis, label }: Pick<FloorColumn, "axis" | "label">): string {
  if (axis === null) return label;
  return `${axisWord(axis)} ${label[0]?.toLowerCase() ?? ""}${label.slice(1)}`;
}

/** The cell of a row: what the row holds, blank for a model without the parameter, undefined for as required. */
export function cellOf(row: FloorRow, column: FloorColumn): FloorCell | "blank" | undefined {
  if (column.modelIds && !column.modelIds.includes(row.modelId)) return "blank";
  const cell = row.cells[column.key];
  return cell?.kind === "absent" ? "blank" : cell;
}

/** A cell in words, without its column: "drift, over limit: 0.80 A, required 1.20 A". */
export function cellWords(cell: FloorCell | "blank" | undefined): string {
  if (cell === undefined) return "as required";
  if (cell === "blank") return "not on this machine";
  if (cell.kind === "deviation") return `permitted deviation: ${cell.title}`;
  if (cell.kind === "not_read") return cell.title === "" ? "not read" : `not read: ${cell.title}`;
  const consequence = cell.level === undefined ? "" : `, ${LEVEL_WORDS[cell.level]}`;
  return `drift${consequence}: ${cell.title}`;
}

export interface OffRequired {
  /** Drifted parameters and permitted deviations, each in words. */
  readonly told: readonly { readonly key: string; readonly cell: FloorCell; readonly words: string }[];
  /** Names of parameters not read. */
  readonly notRead: readonly string[];
}

/** What a row has that is not as required, in words and in the order of the columns; for the list on a phone. */
export function offRequired(row: FloorRow, columns: readonly FloorColumn[]): OffRequired {
  const told: OffRequired["told"][number][] = [];
  const notRead: string[] = [];
  for (const column of columns) {
    const cell = cellOf(row, column);
    if (cell === undefined || cell === "blank") continue;
    if (cell.kind === "not_read") notRead.push(columnWords(column));
    else told.push({ key: column.key, cell, words: `${columnWords(column)}: ${cell.title}` });
  }
  return { told, notRead };
}
