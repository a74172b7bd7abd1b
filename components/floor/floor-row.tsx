import Link from "next/link";
import { memo } from "react";
import type { FloorColumn, FloorRow } from "@/lib/domain/floor";
import { CellMark } from "./cell-mark";
import { cellOf, cellWords, columnWords } from "./cell-words";
import { LEADING_COLUMNS } from "./column-groups";
import { StandingMark } from "./standing-mark";

export interface FloorRowViewProps {
  readonly row: FloorRow;
  /** From 0. */
  readonly index: number;
  readonly columns: readonly FloorColumn[];
  /** Columns that open an axis, by index. */
  readonly opens: ReadonlySet<number>;
  /** Pixels from the top of the body; null while printing, where rows follow one another. */
  readonly top: number | null;
  /** Column of the cell that Tab reaches; null when it is in another row. */
  readonly activeColumn: number | null;
  readonly href: string;
}

function place(index: number, column: number, activeColumn: number | null) {
  return {
    "aria-colindex": column + 1,
    "data-row": index,
    "data-column": column,
    tabIndex: column === activeColumn ? 0 : -1,
  };
}

function ParameterCell({
  row,
  column,
  opens,
  at,
}: {
  row: FloorRow;
  column: FloorColumn;
  opens: boolean;
  at: ReturnType<typeof place>;
}) {
  const cell = cellOf(row, column);
  const words = `${columnWords(column)}, ${cellWords(cell)}`;
  const kind = cell === undefined ? "same" : cell === "blank" ? "blank" : cell.kind;
  return (
    <div
      role="gridcell"
      className={`floor-cell floor-cell-${kind}${opens ? " floor-cell-opens" : ""}`}
      aria-label={words}
      title={kind === "same" || kind === "blank" ? undefined : words}
      {...at}
    >
      {cell !== undefined && cell !== "blank" && <CellMark cell={cell} />}
    </div>
  );
}

/** One machine of the map. */
function FloorRowPlain({ row, index, columns, opens, top, activeColumn, href }: FloorRowViewProps) {
  return (
    <div
      role="row"
      aria-rowindex={index + 2}
      className={`floor-row floor-row-${row.standing}`}
      style={top === null ? undefined : { position: "absolute", top: 0, transform: `translateY(${top}px)` }}
    >
      <div role="rowheader" className="floor-machine" aria-colindex={1}>
        <StandingMark standing={row.standing} />
        <Link
          href={href}
          prefetch={false}
          data-row={index}
          data-column={0}
          tabIndex={activeColumn === 0 ? 0 : -1}
        >
          {row.serial}
        </Link>
      </div>
      <div
        role="gridcell"
        className="floor-model"
        title={`${row.modelName}, ${row.siteName}`}
        {...place(index, 1, activeColumn)}
      >
        {row.modelName}
      </div>
      <div role="gridcell" className="floor-sentence" title={row.sentence} {...place(index, 2, activeColumn)}>
        {row.sentence}
      </div>
      {columns.map((column, at) => (
        <ParameterCell
          key={column.key}
          row={row}
          column={column}
          opens={opens.has(at)}
          at={place(index, at + LEADING_COLUMNS, activeColumn)}
        />
      ))}
    </div>
  );
}

export const FloorRowView = memo(FloorRowPlain);
