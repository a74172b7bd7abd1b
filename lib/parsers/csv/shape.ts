import { readScalar } from "../scalar";
import type { Field } from "./records";

/** How a table is meant; the numbers are columns, -1 for none. `names` are those of the columns behind the first. */
export type Shape =
  | { readonly kind: "pairs"; readonly header: boolean; readonly unit: number; readonly comment: number }
  | { readonly kind: "wide"; readonly header: boolean; readonly names: readonly string[] };

const KEY_WORDS = ["key", "name", "parameter", "setting", "property"];
const VALUE_WORDS = ["value", "values"];
/** What the rows of a table of axes are headed by (common practice, no source). */
const ROW_WORDS = ["axis", "axes", "motor", "drive", "joint"];
const UNIT_WORDS = ["unit", "units"];
const COMMENT_WORDS = ["comment", "comments", "note", "notes", "remark", "description"];

/** Two columns, or a column headed “value” behind the first, are names with values; anything wider, or headed “axis”, is a table of rows and columns. */
export function shapeOf(records: readonly (readonly Field[])[]): Shape {
  const first = (records[0] ?? []).map(({ said }) => said.trim());
  const words = first.map((word) => word.toLowerCase());
  const valued = VALUE_WORDS.includes(words[1] ?? "");
  const find = (known: readonly string[]) =>
    words.findIndex((word, index) => index > 1 && known.includes(word));
  const rows = ROW_WORDS.includes(words[0] ?? "") && !isNumber(first[1]) && records.length > 1;
  if ((first.length <= 2 && !rows) || valued) {
    const header = valued || (KEY_WORDS.includes(words[0] ?? "") && !isNumber(first[1]));
    return { kind: "pairs", header, unit: find(UNIT_WORDS), comment: find(COMMENT_WORDS) };
  }
  if (
    first.length === 3 &&
    records.every((fields) => isNumber(fields[1]?.said) && !isNumber(fields[2]?.said))
  )
    return { kind: "pairs", header: false, unit: 2, comment: -1 };
  const header = first.slice(1).every((word) => word !== "" && !isNumber(word));
  return { kind: "wide", header, names: header ? first.slice(1) : [] };
}

function isNumber(text: string | undefined): boolean {
  const trimmed = text?.trim() ?? "";
  return readScalar(trimmed, 0, trimmed.length, { c: false }).kind === "number";
}
