/** Where the lines of a configuration's texts stand on a page. */
export interface LineAnchors {
  /** Paths of the texts, in the order shown; the lines of the first are #L1 …, of the second #F2L1 … */
  readonly paths: readonly string[];
  /** Address of the page that shows the texts; empty for the same page. */
  readonly base?: string | undefined;
}

/** The id of a line (from 1) of the text at `index` (from 0). */
export function lineId(index: number, line: number): string {
  return index === 0 ? `L${line}` : `F${index + 1}L${line}`;
}

/** The address of a line; null for a text that the page does not show. */
export function lineHref({ paths, base = "" }: LineAnchors, path: string, line: number): string | null {
  const index = paths.indexOf(path);
  return index < 0 ? null : `${base}#${lineId(index, line)}`;
}
