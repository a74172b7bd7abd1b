/** A cell of the grid; both from 0, the head row not counted. */
export interface GridCell {
  readonly row: number;
  readonly column: number;
}

export interface GridSize {
  readonly rows: number;
  readonly columns: number;
  /** Rows that Page Up and Page Down go. */
  readonly page: number;
}

interface Press {
  readonly key: string;
  readonly ctrlKey: boolean;
}

function clamp(value: number, count: number): number {
  return Math.min(Math.max(value, 0), Math.max(count - 1, 0));
}

/** Where a key leads from a cell (ARIA authoring practices, grid pattern), or null for a key that the grid leaves alone. */
export function nextCell(
  from: GridCell,
  { key, ctrlKey }: Press,
  { rows, columns, page }: GridSize,
): GridCell | null {
  const to = (row: number, column: number): GridCell => ({
    row: clamp(row, rows),
    column: clamp(column, columns),
  });
  const { row, column } = from;
  switch (key) {
    case "ArrowUp":
      return to(ctrlKey ? 0 : row - 1, column);
    case "ArrowDown":
      return to(ctrlKey ? rows : row + 1, column);
    case "ArrowLeft":
      return to(row, ctrlKey ? 0 : column - 1);
    case "ArrowRight":
      return to(row, ctrlKey ? columns : column + 1);
    case "Home":
      return to(ctrlKey ? 0 : row, 0);
    case "End":
      return to(ctrlKey ? rows : row, columns);
    case "PageUp":
      return to(row - page, column);
    case "PageDown":
      return to(row + page, column);
    default:
      return null;
  }
}
