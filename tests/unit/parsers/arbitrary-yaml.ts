import fc from "fast-check";
import { prose, someBlanks, word, type ModelEntry, type ModelText } from "./arbitrary-texts";

const number = fc.oneof(
  fc.integer({ min: -99_999, max: 99_999 }).map(String),
  fc.tuple(fc.integer({ min: 0, max: 99 }), fc.integer({ min: 0, max: 99 })).map(([a, b]) => `${a}.${b}`),
  fc.constantFrom("0x3FF", "0o17", "6.5e2", "-.5", "+3"),
);
const text = fc.oneof(
  fc.stringMatching(/^[a-z#:,[\]{} ]{0,8}$/).map((inner) => `"${inner}"`),
  fc.stringMatching(/^[a-z#:,[\]{} "\\]{0,8}$/).map((inner) => `'${inner}'`),
  fc.constantFrom('"800 mA"', '"\\u00b5 \\"x\\" \\\\"', "'it''s'", "800 mA", "plain words", "off", "12:30"),
);
const scalar = fc.oneof(number, text, fc.constantFrom("true", "false", "null", "~"));

/** A value of YAML on one line, as typed. */
export const yamlValue: fc.Arbitrary<string> = fc.oneof(
  { weight: 3, arbitrary: scalar },
  {
    weight: 1,
    arbitrary: fc
      .tuple(fc.array(scalar, { maxLength: 5 }), fc.constantFrom(",", ", ", " , "))
      .map(([items, comma]) => `[${items.join(comma)}]`)
      .filter((list) => !/[^ ,[]:[^ ]/.test(list) || list.includes('"') || list.includes("12:30")),
  },
);

type Tree =
  | { readonly name: string; readonly raw: string; readonly gap: string; readonly said: string | null }
  | { readonly name: string; readonly dashed: readonly string[] }
  | { readonly name: string; readonly members: readonly Tree[] }
  | { readonly off: string; readonly raw: string };

const { tree } = fc.letrec<{ tree: Tree }>((tie) => ({
  tree: fc.oneof(
    { depthSize: "small", withCrossShrink: true },
    fc.record({
      name: fc.oneof(word, fc.constantFrom("__proto__", "constructor", "a b", "12")),
      raw: yamlValue,
      gap: someBlanks,
      said: fc.option(prose, { nil: null, freq: 3 }),
    }),
    fc.record({ off: word, raw: number }),
    fc.record({ name: word, dashed: fc.array(scalar, { minLength: 1, maxLength: 4 }) }),
    fc.record({ name: word, members: fc.array(tie("tree"), { minLength: 1, maxLength: 4 }) }),
  ),
}));

interface Written {
  readonly lines: string[];
  readonly entries: ModelEntry[];
}

function write(
  members: readonly Tree[],
  { prefix, indent, end }: { prefix: string; indent: string; end: string },
) {
  const written: Written = { lines: [], entries: [] };
  let keys = 0;
  for (const one of members) {
    if ("off" in one) {
      if (keys === 0) continue;
      written.lines.push(`${indent}# ${one.off}: ${one.raw}`);
      written.entries.push({ key: prefix + one.off, raw: one.raw, disabled: true, comment: null });
      continue;
    }
    const entry = { key: prefix + one.name, disabled: false, comment: null };
    if ("members" in one) {
      const inner = write(one.members, { prefix: `${prefix}${one.name}.`, indent: `${indent}  `, end });
      if (inner.entries.every(({ disabled }) => disabled)) continue;
      keys++;
      written.lines.push(`${indent}${one.name}:`, ...inner.lines);
      written.entries.push(...inner.entries);
      continue;
    }
    keys++;
    if ("dashed" in one) {
      const dashes = one.dashed.map((raw) => `${indent}- ${raw}`);
      written.lines.push(`${indent}${one.name}:`, ...dashes);
      written.entries.push({ ...entry, raw: dashes.join(end).slice(indent.length) });
    } else {
      const said = one.said === null ? "" : `${one.gap}# ${one.said}`;
      written.lines.push(`${indent}${one.name}:${one.gap}${one.raw}${said}`);
      written.entries.push({ ...entry, raw: one.raw, comment: one.said });
    }
  }
  return written;
}

/** A text of YAML with what it says. */
export const yamlText: fc.Arbitrary<ModelText> = fc
  .record({
    members: fc.array(tree, { maxLength: 8 }),
    end: fc.constantFrom("\n", "\r\n"),
    head: fc.constantFrom("", "", "---\n", "\ufeff", "%YAML 1.2\n---\n", "# first\n\n"),
    tail: fc.constantFrom("", "\n", "\n...\n"),
  })
  .map(({ members, end, head, tail }) => {
    const { lines, entries } = write(members, { prefix: "", indent: "", end });
    return { text: `${head}${lines.join(end)}${tail}`, entries };
  });
