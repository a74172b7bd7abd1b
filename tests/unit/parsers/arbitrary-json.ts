import fc from "fast-check";
import { blanks, prose, word, type ModelEntry, type ModelText } from "./arbitrary-texts";

const jsonNumber = fc.oneof(
  fc.integer({ min: -99_999, max: 99_999 }).map(String),
  fc.tuple(fc.integer({ min: 0, max: 999 }), fc.integer({ min: 0, max: 99 })).map(([a, b]) => `${a}.${b}`),
  fc.integer({ min: -8, max: 8 }).map((exponent) => `1.25e${exponent}`),
);
const jsonString = fc.oneof(
  fc.string({ maxLength: 8 }).map((text) => JSON.stringify(text)),
  fc.constantFrom('"800 mA"', '"\\u00b5m"', '"a \\"b\\" // c"', '"/* no comment */"'),
);
const scalar = fc.oneof(jsonNumber, jsonString, fc.constantFrom("true", "false", "null"));

/** A value of JSON, as typed. */
export const jsonValue: fc.Arbitrary<string> = fc.oneof(
  scalar,
  fc
    .tuple(fc.array(scalar, { maxLength: 5 }), fc.constantFrom(",", ", ", " ,\n  "))
    .map(([items, comma]) => `[${items.join(comma)}]`),
);

type Tree =
  | { readonly name: string; readonly raw: string; readonly said: string | null }
  | { readonly name: string; readonly members: readonly Tree[] }
  | { readonly off: string; readonly raw: string };

const { tree } = fc.letrec<{ tree: Tree }>((tie) => ({
  tree: fc.oneof(
    { depthSize: "small", withCrossShrink: true },
    fc.record({
      name: fc.oneof(word, fc.constantFrom("__proto__", "constructor", "a.b", 'µ " x')),
      raw: jsonValue,
      said: fc.option(prose, { nil: null, freq: 3 }),
    }),
    fc.record({ off: word, raw: jsonNumber }),
    fc.record({ name: word, members: fc.array(tie("tree"), { maxLength: 5 }) }),
  ),
}));

interface Layout {
  readonly end: string;
  readonly gap: string;
  readonly mark: string;
}

interface Written {
  readonly lines: string[];
  readonly entries: ModelEntry[];
}

function write(members: readonly Tree[], prefix: string, layout: Layout): Written {
  const written: Written = { lines: [], entries: [] };
  const last = members.findLastIndex((one) => !("off" in one));
  members.forEach((one, index) => {
    const comma = index < last ? "," : "";
    if ("off" in one) {
      written.lines.push(`// "${one.off}": ${one.raw},`);
      written.entries.push({ key: prefix + one.off, raw: one.raw, disabled: true, comment: null });
      return;
    }
    const head = `${JSON.stringify(one.name)}${layout.gap}:${layout.gap}`;
    if ("members" in one) {
      const inner = write(one.members, `${prefix}${one.name}.`, layout);
      written.lines.push(`${head}{`, ...inner.lines, `}${comma}`);
      written.entries.push(...inner.entries);
      return;
    }
    written.lines.push(`${head}${one.raw}${comma}${one.said === null ? "" : ` // ${one.said}`}`);
    written.entries.push({ key: prefix + one.name, raw: one.raw, disabled: false, comment: one.said });
  });
  return written;
}

/** A text of JSON with comments, with what it says. */
export const jsonText: fc.Arbitrary<ModelText> = fc
  .record({
    members: fc.array(tree, { maxLength: 8 }),
    end: fc.constantFrom("\n", "\r\n", "\n  "),
    gap: blanks,
    mark: fc.constantFrom("", "", "\ufeff"),
  })
  .map(({ members, ...layout }) => {
    const { lines, entries } = write(members, "", layout);
    return { text: `${layout.mark}${["{", ...lines, "}"].join(layout.end)}`, entries };
  });
