import fc from "fast-check";
import { blanks, prose, someBlanks, word, type ModelEntry, type ModelText } from "./arbitrary-texts";

const integer = fc.oneof(
  fc.integer({ min: -99_999, max: 99_999 }).map(String),
  fc.constantFrom("0x3FF", "0o17", "0b101", "+80", "12_000", "0"),
);
const float = fc.oneof(
  fc.tuple(fc.integer({ min: -99, max: 99 }), fc.integer({ min: 0, max: 99 })).map(([a, b]) => `${a}.${b}`),
  fc.constantFrom("6.5e2", "1e3", "-0.01", "9_224.617"),
);
const text = fc.oneof(
  fc.stringMatching(/^[a-z#=,[\]{} ']{0,8}$/).map((inner) => `"${inner}"`),
  fc.stringMatching(/^[a-z#=,[\]{} "\\]{0,8}$/).map((inner) => `'${inner}'`),
  fc.constantFrom('"800 mA"', '"\\u00b5m \\"x\\" \\\\"', '"""two\nlines"""', "'''\n'' \"'''", '""'),
);
const moment = fc.constantFrom("1979-05-27T07:32:00Z", "07:32:00");
const scalar = fc.oneof(integer, float, text, fc.constantFrom("true", "false"), moment);

/** A value of TOML, as typed. */
export const tomlValue: fc.Arbitrary<string> = fc.oneof(
  { weight: 3, arbitrary: scalar },
  {
    weight: 1,
    arbitrary: fc
      .tuple(fc.array(scalar, { maxLength: 5 }), fc.constantFrom(",", ", ", " ,\n  ", ", # note ]\n"))
      .map(([items, comma]) => `[${items.join(comma)}]`),
  },
);

interface Chunk {
  readonly text: string;
  readonly entry?: ModelEntry;
  readonly section?: string;
}

const key = fc.oneof(
  word.map((name) => [name, name] as const),
  fc.tuple(word, word).map(([a, b]) => [`${a} . "${b} c"`, `${a}.${b} c`] as const),
  fc.constantFrom(["__proto__", "__proto__"] as const, ['"constructor"', "constructor"] as const),
);
const entryLine: fc.Arbitrary<Chunk> = fc
  .record({
    indent: blanks,
    key,
    gap: blanks,
    raw: tomlValue,
    said: fc.option(fc.tuple(someBlanks, prose), { nil: null }),
  })
  .map(({ indent, key: [typed, name], gap, raw, said }) => ({
    text: `${indent}${typed}${gap}=${gap}${raw}${said ? `${said[0]}# ${said[1]}` : ""}`,
    entry: { key: name, raw, disabled: false, comment: said ? said[1] : null },
  }));
const disabledLine: fc.Arbitrary<Chunk> = fc
  .tuple(fc.constantFrom("#", "# ", "## "), word, fc.oneof(integer, float))
  .map(([mark, name, raw]) => ({
    text: `${mark}${name} = ${raw}`,
    entry: { key: name, raw, disabled: true, comment: null },
  }));
const sectionLine: fc.Arbitrary<Chunk> = fc
  .tuple(blanks, fc.stringMatching(/^[a-z]{1,5}(\.[a-z])?$/))
  .map(([indent, section]) => ({ text: `${indent}[${section}]`, section }));
const other: fc.Arbitrary<Chunk> = fc.oneof(
  blanks.map((line) => ({ text: line })),
  prose.map((words) => ({ text: `# ${words}` })),
);

/** A text of TOML with what it says. */
export const tomlText: fc.Arbitrary<ModelText> = fc
  .record({
    mark: fc.constantFrom("", "", "\ufeff"),
    end: fc.constantFrom("\n", "\r\n"),
    chunks: fc.array(
      fc.oneof(
        { weight: 6, arbitrary: entryLine },
        { weight: 1, arbitrary: disabledLine },
        { weight: 1, arbitrary: sectionLine },
        { weight: 1, arbitrary: other },
      ),
      { maxLength: 20 },
    ),
  })
  .map(({ mark, end, chunks }) => {
    let prefix = "";
    const entries: ModelEntry[] = [];
    for (const { entry, section } of chunks) {
      if (section !== undefined) prefix = `${section}.`;
      if (entry) entries.push({ ...entry, key: prefix + entry.key });
    }
    return { text: mark + chunks.map((chunk) => chunk.text + end).join(""), entries };
  });
