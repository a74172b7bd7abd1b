"use client";

import { defaultRangeExtractor, useVirtualizer, type Range } from "@tanstack/react-virtual";
import {
  useCallback,
  useEffect,
  useMemo,
  useRef,
  useState,
  type CSSProperties,
  type KeyboardEvent,
  type MouseEvent,
} from "react";
import type { FloorColumn, FloorRow } from "@/lib/domain/floor";
import { plural } from "@/lib/domain/sentences";
import { axisTitle } from "@/components/findings/axis-title";
import { usePrinting } from "./browser-state";
import { cellOf, cellWords, columnWords } from "./cell-words";
import { columnAt, floorLayout, LEADING_COLUMNS, WIDTHS, type FloorLayout } from "./column-groups";
import { FloorRowView } from "./floor-row";
import { FurtherRight } from "./further-right";
import { nextCell, type GridCell } from "./grid-keys";
import type { FloorData } from "./types";

/** Pixels. */
const ROW = 28;
const HEAD = 96;
/** Rows put on paper; more than that belongs to a filter. */
const PRINTED_ROWS = 2000;
/** Pixels between the margins of an A4 sheet on its side, less the frame of the sheet. */
const PRINTED_WIDTH = 960;
/** What the server draws before it knows the window. */
const FIRST_RECT = { width: 1200, height: 720 };

export interface FloorGridProps extends FloorData {
  /** Address of a machine without its id. */
  readonly machineBase: string;
}

function Head({ columns, layout }: { columns: readonly FloorColumn[]; layout: FloorLayout }) {
  return (
    <div role="rowgroup" className="floor-head">
      <div className="floor-row floor-axes" aria-hidden="true">
        {layout.groups.map(({ axis, start, count }) => (
          <span
            key={`${axis ?? ""}${start}`}
            style={{ gridColumn: `${LEADING_COLUMNS + start + 1} / span ${count}` }}
          >
            {axisTitle(axis)}
          </span>
        ))}
      </div>
      <div role="row" aria-rowindex={1} className="floor-row floor-heads">
        <div role="columnheader" aria-colindex={1} className="floor-machine">
          <span>Machine</span>
        </div>
        <div role="columnheader" aria-colindex={2}>
          Model
        </div>
        <div role="columnheader" aria-colindex={3}>
          Standing
        </div>
        {columns.map((column, index) => (
          <div
            key={column.key}
            role="columnheader"
            aria-colindex={LEADING_COLUMNS + index + 1}
            title={columnWords(column)}
            className={layout.opens.has(index) ? "floor-slant floor-cell-opens" : "floor-slant"}
          >
            <span className="visually-hidden">{columnWords(column)}</span>
            <span className="floor-slant-word" aria-hidden="true">
              {column.short}
            </span>
          </div>
        ))}
      </div>
    </div>
  );
}

/** The active cell in words, for those who cannot hover. */
function readout(row: FloorRow | undefined, { column }: GridCell, columns: readonly FloorColumn[]): string {
  if (!row) return "";
  const parameter = columns[column - LEADING_COLUMNS];
  if (!parameter) return `${row.serial}, ${row.modelName}, ${row.siteName}: ${row.sentence}`;
  return `${row.serial}, ${columnWords(parameter)}: ${cellWords(cellOf(row, parameter))}`;
}

function useRows(count: number, activeRow: number) {
  const scroller = useRef<HTMLDivElement>(null);
  const rangeExtractor = useCallback(
    (range: Range) => {
      const indices = defaultRangeExtractor(range);
      // The active row stays in the document, so that the focus is never lost by scrolling.
      return indices.includes(activeRow) || activeRow >= count
        ? indices
        : [...indices, activeRow].sort((a, b) => a - b);
    },
    [activeRow, count],
  );
  // eslint-disable-next-line react-hooks/incompatible-library -- the library's object changes on its own; nothing here memoizes it
  const virtualizer = useVirtualizer({
    count,
    getScrollElement: () => scroller.current,
    estimateSize: () => ROW,
    overscan: 12,
    rangeExtractor,
    scrollMargin: HEAD,
    scrollPaddingStart: HEAD,
    initialRect: FIRST_RECT,
  });
  return { scroller, virtualizer };
}

function cellAt(target: EventTarget): GridCell | null {
  const element = target instanceof HTMLElement ? target.closest<HTMLElement>("[data-row]") : null;
  return element ? { row: Number(element.dataset.row), column: Number(element.dataset.column) } : null;
}

/** The cell under a press on a point, which has no element of its own. */
function cellUnder(event: MouseEvent, { tracks }: FloorLayout): GridCell | null {
  if (!(event.target instanceof HTMLElement) || cellAt(event.target)) return null;
  const row = event.target.closest<HTMLElement>("[data-index]");
  if (!row) return null;
  return {
    row: Number(row.dataset.index),
    column: columnAt(event.clientX - row.getBoundingClientRect().left, tracks),
  };
}

/** The floor as an ARIA grid: machines by parameters, worked by keyboard alone. */
export function FloorGrid({ columns, rows, machineBase }: FloorGridProps) {
  const [active, setActive] = useState<GridCell>({ row: 0, column: 0 });
  const moved = useRef(false);
  const printing = usePrinting();
  const { scroller, virtualizer } = useRows(rows.length, active.row);
  const layout = useMemo(() => floorLayout(columns), [columns]);

  useEffect(() => {
    if (!moved.current) return;
    moved.current = false;
    scroller.current
      ?.querySelector<HTMLElement>(`[data-row="${active.row}"][data-column="${active.column}"]`)
      ?.focus();
  }, [active, scroller]);

  const press = (event: KeyboardEvent): void => {
    const from = cellAt(event.target);
    if (!from || event.altKey || event.metaKey) return;
    if (event.key === "Enter" && from.column > 0) {
      event.preventDefault();
      scroller.current?.querySelector<HTMLElement>(`a[data-row="${from.row}"]`)?.click();
      return;
    }
    const page = Math.max(1, Math.floor(((scroller.current?.clientHeight ?? 0) - HEAD) / ROW) - 1);
    const to = nextCell(from, event, { rows: rows.length, columns: columns.length + LEADING_COLUMNS, page });
    if (!to) return;
    event.preventDefault();
    moved.current = true;
    virtualizer.scrollToIndex(to.row, { align: "auto" });
    setActive(to);
  };

  const view = (index: number, top: number | null) => {
    const row = rows[index];
    return (
      row && (
        <FloorRowView
          key={row.machineId}
          row={row}
          index={index}
          columns={columns}
          layout={layout}
          top={top}
          activeColumn={active.row === index ? active.column : null}
          href={`${machineBase}/${row.machineId}`}
        />
      )
    );
  };
  const style = {
    "--floor-tracks": layout.tracks.map((track) => `${track}px`).join(" "),
    "--floor-width": `${layout.width}px`,
    "--floor-print-zoom": Math.min(1, PRINTED_WIDTH / layout.width),
    "--floor-gap": `${WIDTHS.gap}px`,
    "--floor-parameter": `${WIDTHS.parameter}px`,
  } as CSSProperties;
  return (
    <div className="floor-grid" style={style}>
      <FurtherRight scroller={scroller} layout={layout} />
      <div
        ref={scroller}
        className="floor-scroll"
        role="grid"
        aria-label="Machines by parameters"
        aria-rowcount={rows.length + 1}
        aria-colcount={columns.length + LEADING_COLUMNS}
        onKeyDown={press}
        onClick={(event) => {
          const cell = cellUnder(event, layout);
          if (!cell) return;
          moved.current = true;
          setActive(cell);
        }}
        onFocus={(event) => {
          const cell = cellAt(event.target);
          if (cell && (cell.row !== active.row || cell.column !== active.column)) setActive(cell);
        }}
      >
        <Head columns={columns} layout={layout} />
        <div
          role="rowgroup"
          className="floor-body"
          style={printing ? undefined : { height: virtualizer.getTotalSize() }}
        >
          {printing
            ? rows.slice(0, PRINTED_ROWS).map((_, index) => view(index, null))
            : virtualizer.getVirtualItems().map(({ index, start }) => view(index, start - HEAD))}
        </div>
      </div>
      {printing && rows.length > PRINTED_ROWS && (
        <p>
          {plural(rows.length - PRINTED_ROWS, "more machine")} not printed; a filter brings them onto paper.
        </p>
      )}
      <p className="floor-readout" aria-hidden="true">
        {readout(rows[active.row], active, columns)}
      </p>
    </div>
  );
}
