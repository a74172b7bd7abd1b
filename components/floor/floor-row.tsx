import Link from "next/link";
import { memo } from "react";
import type { FloorCell, FloorColumn, FloorRow } from "@/lib/domain/floor";
import { CellMark } from "./cell-mark";
import { cellOf, cellWords, columnWords } from "./cell-words";
import { LEADING_COLUMNS, type FloorLayout } from "./column-groups";
import { StandingMark } from "./standing-mark";

export interface FloorRowViewProps {
  readonly row: FloorRow;
  /** From 0. */
  readonly index: number;
  readonly columns: readonly FloorColumn[];
  readonly layout: FloorLayout;
  /** Pixels from the top of the body; null while printing, where rows follow one another. */
  readonly top: number | null;
  /** Column of the cell that Tab reaches; null when it is in another row. */
  readonly activeColumn: number | null;
  readonly href: string;
}

type Cell = FloorCell | "blank" | undefined;

function place(index: number, column: number, activeColumn: number | null) {
  return {
    "aria-colindex": column + 1,
    "data-row": index,
    "data-column": column,
    tabIndex: column === activeColumn ? 0 : -1,
    style: { gridColumn: column + 1 },
  };
}

interface ParameterCellProps {
  readonly cell: Cell;
  readonly column: FloorColumn;
  readonly opens: boolean;
  readonly at: ReturnType<typeof place>;
}

function ParameterCell({ cell, column, opens, at }: ParameterCellProps) {
  const words = `${columnWords(column)}, ${cellWords(cell)}`;
  const drawn = cell !== undefined && cell !== "blank";
  return (
    <div
      role="gridcell"
      className={`floor-cell${opens ? " floor-cell-opens" : ""}${cell === "blank" ? " floor-cell-blank" : ""}`}
      aria-label={words}
      title={drawn ? words : undefined}
      {...at}
    >
      {drawn && <CellMark cell={cell} />}
    </div>
  );
}

/** The points of what is as required, one drawing for each axis that the machine has. */
function Points({ cells, layout }: { cells: readonly Cell[]; layout: FloorLayout }) {
  return layout.groups.map(({ start, count }) => {
    if (cells.slice(start, start + count).every((cell) => cell === "blank")) return null;
    const gridColumn = `${LEADING_COLUMNS + start + 1} / span ${count}`;
    return <div key={start} className="floor-points" role="presentation" style={{ gridColumn }} />;
  });
}

/**
 * One machine of the map. A row that is not being walked through holds cells only where something is off: the grid
 * tells columns by index, and a screenful of points costs one drawing an axis instead of a thousand elements.
 */
function FloorRowPlain({ row, index, columns, layout, top, activeColumn, href }: FloorRowViewProps) {
  const cells = columns.map((column) => cellOf(row, column));
  const walked = activeColumn !== null;
  return (
    <div
      role="row"
      aria-rowindex={index + 2}
      data-index={index}
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
      <Points cells={cells} layout={layout} />
      {columns.map((column, at) => {
        const cell = cells[at];
        if (!walked && (cell === undefined || (cell === "blank" && isBlankAxis(cells, at, layout))))
          return null;
        return (
          <ParameterCell
            key={column.key}
            cell={cell}
            column={column}
            opens={layout.opens.has(at)}
            at={place(index, at + LEADING_COLUMNS, activeColumn)}
          />
        );
      })}
    </div>
  );
}

/** Whether every cell of the axis of column `at` is blank; then no point is drawn that would have to be covered. */
function isBlankAxis(cells: readonly Cell[], at: number, { groups }: FloorLayout): boolean {
  const group = groups.find(({ start, count }) => start <= at && at < start + count);
  return (
    group !== undefined &&
    cells.slice(group.start, group.start + group.count).every((cell) => cell === "blank")
  );
}

export const FloorRowView = memo(FloorRowPlain);
