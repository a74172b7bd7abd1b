import { Pieces } from "../pieces";
import { readScalar, type Scalar } from "../scalar";
import { TreeBuilder, type ScalarAt, type Section } from "../tree";
import type { Document } from "../types";
import { cutRecords, delimiterOf, type CsvFault, type Field } from "./records";
import { shapeOf, type Shape } from "./shape";

/** Reads a table (RFC 4180): a name and a value in each row, or a name in each row and column. Never throws on a text. */
export function parseCsv(path: string, text: string): Document {
  const build = new TreeBuilder(text);
  const pieces = new Pieces(text.length / 4);
  const { records, faults } = cutRecords(text, delimiterOf(text), pieces);
  const shape = shapeOf(records);
  const rows = new Map<string, Section>();
  const width = records[0]?.length ?? 0;
  for (const fields of records.slice(shape.header ? 1 : 0)) {
    if (fields.length !== width) tellWidth(build, fields, width);
    if (shape.kind === "pairs") addPair(build, fields, shape);
    else addRow(build, fields, { names: shape.names, rows });
  }
  for (const fault of faults) report(build, fault);
  const { entries, diagnostics } = build;
  return { path, format: "csv", text, pieces: pieces.triples(), entries, diagnostics: diagnostics.all() };
}

function report(build: TreeBuilder, { start, end, kind }: CsvFault): void {
  if (kind === "after-quote") return build.unread(start, end, "something follows a closing quote.");
  const span = build.lines.span(start, end);
  const message = `The quote on line ${span.line}, column ${span.column} is not closed, so the rest of the text is one field. Everything is kept; close it.`;
  build.diagnostics.add("unclosed-quote", "warning", span, message);
}

function tellWidth(build: TreeBuilder, fields: readonly Field[], width: number): void {
  const start = fields[0]?.start ?? 0;
  const span = build.lines.span(start, fields.at(-1)?.end ?? start);
  const message = `Line ${span.line} has ${fields.length} fields, and the first line has ${width}. It is read as far as that goes; check that no sign between fields is missing.`;
  build.diagnostics.add("not-standard", "warning", span, message);
}

function addPair(
  build: TreeBuilder,
  fields: readonly Field[],
  { unit, comment }: Extract<Shape, { kind: "pairs" }>,
): void {
  const [key, value] = fields;
  if (!key || key.said === "") return;
  const name = { name: key.said, start: key.start, end: key.end };
  const subtree = build.open(build.root, name);
  const at = value ?? { start: key.end, end: key.end, said: "", quoted: false };
  const entry = build.scalar(build.root, name, scalarAt(at, fields[unit]?.said));
  build.close(subtree);
  const note = fields[comment];
  if (note && note.said !== "") entry.setComment(note.start, note.end, note.said);
}

function addRow(
  build: TreeBuilder,
  [row, ...fields]: readonly Field[],
  { names, rows }: { readonly names: readonly string[]; readonly rows: Map<string, Section> },
): void {
  if (!row || row.said === "") return;
  const section = rows.get(row.said) ?? build.root.child(row.said);
  rows.set(row.said, section);
  fields.forEach((field, index) => {
    // An empty field of a wide table says that the row has no such value.
    if (field.said === "" && !field.quoted) return;
    const name = { name: names[index] ?? String(index), start: row.start, end: row.end };
    const subtree = build.open(section, name);
    build.scalar(section, name, scalarAt(field));
    build.close(subtree);
  });
}

/** A number in one field may have its unit in another. */
function scalarAt({ start, end, said, quoted }: Field, unit = ""): ScalarAt {
  const trimmed = said.trim();
  const scalar: Scalar = quoted
    ? { kind: "text", value: said }
    : readScalar(trimmed, 0, trimmed.length, { c: false });
  const bare = readScalar(trimmed, 0, trimmed.length, { c: false });
  if (unit.trim() === "" || bare.kind !== "number" || bare.unit !== null)
    return { start, end, value: scalar };
  return { start, end, value: { ...bare, unit: unit.trim() } };
}
