import fc from "fast-check";
import { blanks, prose, someBlanks, word, type ModelEntry, type ModelText } from "./arbitrary-texts";

const number = fc.oneof(
  fc.integer({ min: -99_999, max: 99_999 }).map(String),
  fc.tuple(fc.integer({ min: 0, max: 99 }), fc.integer({ min: 0, max: 99 })).map(([a, b]) => `${a}.${b}`),
  fc.constantFrom("0x3FF", "6.5e2", "800 mA", "80 mm/s^2"),
);
const truth = fc.constantFrom("true", "No", "off");

interface Chunk {
  readonly text: string;
  readonly entry?: ModelEntry;
}

function textOf(chunks: fc.Arbitrary<Chunk>): fc.Arbitrary<ModelText> {
  return fc
    .record({
      mark: fc.constantFrom("", "", "\ufeff"),
      end: fc.constantFrom("\n", "\r\n", "\r"),
      chunks: fc.array(chunks, { maxLength: 20 }),
    })
    .map(({ mark, end, chunks: all }) => ({
      text: mark + all.map(({ text }) => text + end).join(""),
      entries: all.flatMap(({ entry }) => (entry ? [entry] : [])),
    }));
}

/** A value of `.properties`, as typed: escapes, a line continued, a list. */
export const propertiesValue: fc.Arbitrary<string> = fc.oneof(
  number,
  truth,
  fc.constantFrom(
    "a \\u00b5m",
    "two \\\n   lines",
    "C:\\\\dir",
    "80,80.5, 400",
    "plain words",
    '"quoted"',
    "tab\\t x",
  ),
);

const propertiesLine: fc.Arbitrary<Chunk> = fc
  .record({
    indent: blanks,
    key: fc.oneof(
      word.map((name) => [name, name] as const),
      fc.constantFrom(
        ["a\\ b", "a b"] as const,
        ["a\\:b\\=c", "a:b=c"] as const,
        ["\\u0061x", "ax"] as const,
        ["__proto__", "__proto__"] as const,
      ),
    ),
    mark: fc.constantFrom("=", ":", " = ", " : ", " ", "\t", " \\\n  = "),
    raw: propertiesValue,
  })
  .map(({ indent, key: [typed, key], mark, raw }) => ({
    text: `${indent}${typed}${mark}${raw}`,
    entry: { key, raw, disabled: false, comment: null },
  }));
const propertiesOff: fc.Arbitrary<Chunk> = fc
  .tuple(fc.constantFrom("#", "! ", "## "), word, number)
  .map(([mark, key, raw]) => ({
    text: `${mark}${key}=${raw}`,
    entry: { key, raw, disabled: true, comment: null },
  }));
const propertiesOther: fc.Arbitrary<Chunk> = fc.oneof(
  blanks.map((text) => ({ text })),
  fc.tuple(fc.constantFrom("# ", "! "), prose).map(([mark, words]) => ({ text: `${mark}${words}` })),
);

/** A text of `.properties` with what it says. */
export const propertiesText = textOf(
  fc.oneof(
    { weight: 6, arbitrary: propertiesLine },
    { weight: 1, arbitrary: propertiesOff },
    { weight: 1, arbitrary: propertiesOther },
  ),
);

/** A value of a shell assignment, as typed. */
export const envValue: fc.Arbitrary<string> = fc.oneof(
  number,
  truth,
  fc.constantFrom('"800 mA"', "'it is # no comment'", '"a \\"b\\" c"', '"two\nlines"', "plain#word", '""'),
);
const envLine: fc.Arbitrary<Chunk> = fc
  .record({
    head: fc.constantFrom("", "", "export ", "  "),
    key: fc.oneof(word, fc.stringMatching(/^[A-Z][A-Z0-9_]{0,8}$/), fc.constant("__proto__")),
    mark: fc.constantFrom("=", "=", " = "),
    raw: envValue,
    said: fc.option(fc.tuple(someBlanks, prose), { nil: null }),
  })
  .map(({ head, key, mark, raw, said }) => ({
    text: `${head}${key}${mark}${raw}${said ? `${said[0]}# ${said[1]}` : ""}`,
    entry: { key, raw, disabled: false, comment: said ? said[1] : null },
  }));
const envOff: fc.Arbitrary<Chunk> = fc
  .tuple(fc.constantFrom("#", "# ", "# export "), word, number)
  .map(([mark, key, raw]) => ({
    text: `${mark}${key}=${raw}`,
    entry: { key, raw, disabled: true, comment: null },
  }));
const envOther: fc.Arbitrary<Chunk> = fc.oneof(
  blanks.map((text) => ({ text })),
  prose.map((words) => ({ text: `# ${words}` })),
);

/** A text of shell assignments with what it says. */
export const envText = textOf(
  fc.oneof(
    { weight: 6, arbitrary: envLine },
    { weight: 1, arbitrary: envOff },
    { weight: 1, arbitrary: envOther },
  ),
);

/** A field of a table, as typed. */
export const csvValue: fc.Arbitrary<string> = fc.oneof(
  number,
  truth,
  fc.constantFrom('"800 mA"', '"a, b; c"', '"he said ""no"""', '"two\nlines"', "plain words", '""'),
);

/** A table of two columns or a wide one, with what it says. */
export const csvText: fc.Arbitrary<ModelText> = fc
  .record({
    mark: fc.constantFrom("", "", "\ufeff"),
    end: fc.constantFrom("\n", "\r\n"),
    delimiter: fc.constantFrom(",", ";", "\t"),
    columns: fc.constantFrom(["value"], ["run", "hold"], ["run", "hold", "u x"]),
    rows: fc.array(
      fc.tuple(
        fc.oneof(word, fc.constantFrom("__proto__", '"a b"')),
        fc.array(csvValue, { minLength: 3, maxLength: 3 }),
      ),
      { maxLength: 10 },
    ),
    gap: fc.constantFrom("", " "),
  })
  .map(({ mark, end, delimiter, columns, rows, gap }) => {
    const pairs = columns.length === 1;
    const lines = [["name", ...columns].join(delimiter)];
    const entries: ModelEntry[] = [];
    for (const [typed, cells] of rows) {
      const row = typed.replaceAll('"', "");
      const used = cells.slice(0, columns.length);
      lines.push([typed, ...used.map((raw) => gap + raw + gap)].join(delimiter));
      used.forEach((raw, index) => {
        entries.push({ key: pairs ? row : `${row}.${columns[index]}`, raw, disabled: false, comment: null });
      });
    }
    return { text: mark + lines.join(end), entries };
  });
