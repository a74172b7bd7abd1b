import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { mergeConfigurations } from "@/lib/review/merge";
import type { MergeChoice, MergeResult } from "@/lib/review/merge-types";
import type { ConfigurationFile } from "@/lib/review/types";
import { ASSEMBLY, check, edited, files, KEY_TABLE, TEXT } from "./support/gantry";

type Choices = Readonly<Record<string, MergeChoice>>;
type Sent = string | readonly ConfigurationFile[];

function merge(ours: Sent, theirs: Sent, choices: Choices = {}, base: Sent = TEXT): MergeResult {
  const sent = (text: Sent) => (typeof text === "string" ? files(text) : text);
  return mergeConfigurations({
    base: sent(base),
    ours: sent(ours),
    theirs: sent(theirs),
    keyTable: KEY_TABLE,
    assembly: ASSEMBLY,
    choices: new Map(Object.entries(choices)),
  });
}

const textOf = ({ files: merged }: MergeResult) => merged?.[0]?.text ?? null;
const told = ({ conflicts }: MergeResult) =>
  conflicts.flatMap(({ places }) =>
    places.map(({ axis, parameter, key, base, ours, theirs }) => [
      axis,
      parameter ?? key,
      base?.raw ?? null,
      ours?.raw ?? null,
      theirs?.raw ?? null,
    ]),
  );

/** Settles every conflict by one side. */
function settled(ours: Sent, theirs: Sent, choice: MergeChoice, base: Sent = TEXT): MergeResult {
  const choices: Record<string, MergeChoice> = {};
  for (;;) {
    const result = merge(ours, theirs, choices, base);
    const open = result.conflicts.filter((conflict) => conflict.choice === null);
    if (open.length === 0) return result;
    for (const { id } of open) choices[id] = choice;
  }
}

const AMPS = edited("x", "amps = 0.85", "amps = 1.05");

describe("what only one side changed", () => {
  it("is taken from it, be it on lines that touch", () => {
    const result = merge(AMPS, edited("x", "standby = 0.5", "standby = 0.6"));
    expect(textOf(result)).toBe(edited("x", "standby = 0.5", "standby = 0.6", AMPS));
    expect(result.conflicts).toEqual([]);
    expect(result.merged).toEqual([
      { axis: "x", parameter: "run_current", from: "ours" },
      { axis: "x", parameter: "hold_current", from: "theirs" },
    ]);
  });

  it("is the value on one side and the comment of the same line on the other", () => {
    const result = merge(AMPS, edited("x", "amps = 0.85     # A", "amps = 0.85     # A, as measured"));
    expect(textOf(result)).toBe(TEXT.replace("amps = 0.85     # A", "amps = 1.05     # A, as measured"));
  });

  it("goes along when the other side moves the line", () => {
    const moved = TEXT.replace("corner = 12     # mm/s\n", "").replace(
      "[axis.x]\n",
      "[axis.x]\ncorner = 12     # mm/s\n",
    );
    expect(textOf(merge(edited("x", "corner = 12", "corner = 10"), moved))).toBe(
      moved.replace("corner = 12", "corner = 10"),
    );
  });

  it("is the value of a key that the key table does not know, too", () => {
    const result = merge(
      edited("x", "colour = grey", "colour = blue"),
      edited("x", "corner = 12 ", "corner = 10 "),
    );
    expect(textOf(result)).toBe(
      edited("x", "colour = grey", "colour = blue").replace("corner = 12 ", "corner = 10 "),
    );
  });

  it("is one axis of a value in a list", () => {
    const table = {
      rules: [{ key: "amps.{axis}", parameter: "run_current", unit: "A", basis: "rms" } as const],
    };
    const list = (text: string) => [{ path: "a.conf", text }];
    const result = mergeConfigurations({
      base: list("amps = { 0.8, 1.2 }\n"),
      ours: list("amps = { 0.9, 1.2 }\n"),
      theirs: list("amps = { 0.8, 1.3 }\n"),
      keyTable: table,
      assembly: ASSEMBLY,
    });
    expect(textOf(result)).toBe("amps = { 0.9, 1.3 }\n");
  });

  it("keeps the line ends of the side that changed them", () => {
    const crlf = TEXT.replaceAll("\n", "\r\n");
    const noted = TEXT.replace("# bench gantry", "# bench gantry, north");
    expect(textOf(merge(crlf, noted))).toBe(noted.replaceAll("\n", "\r\n"));
  });
});

describe("what both sides changed", () => {
  it("to the same value in another unit or notation is no conflict, whichever side is which", () => {
    const [plain, unit] = [
      edited("x", "vmax = 300 ", "vmax = 250 "),
      edited("x", "vmax = 300 ", "vmax = 0.25 m/s "),
    ];
    const result = merge(plain, unit);
    expect(result.conflicts).toEqual([]);
    expect(textOf(result)).toBe(textOf(merge(unit, plain)));
    expect(check(textOf(result) ?? "").parameters.find((one) => one.parameter === "max_speed")?.value).toBe(
      0.25,
    );
  });

  it("only in its spelling on one side, and in its value on the other, has the value", () => {
    const respelt = edited("x", "vmax = 300 ", "vmax = 0.3 m/s ");
    const changed = edited("x", "vmax = 300 ", "vmax = 250 ");
    for (const [ours, theirs] of [[respelt, changed] as const, [changed, respelt] as const])
      expect(textOf(merge(ours, theirs))).toBe(changed);
  });

  it("to something else is a conflict with what each of the three texts says", () => {
    const result = merge(AMPS, edited("x", "amps = 0.85", "amps = 0.9"));
    expect(result.files).toBeNull();
    expect(told(result)).toEqual([["x", "run_current", "0.85", "1.05", "0.9"]]);
    expect(result.conflicts[0]).toMatchObject({
      kind: "value",
      choice: null,
      options: ["base", "ours", "theirs"],
    });
  });

  it.each([
    ["base", "0.85"],
    ["ours", "1.05"],
    ["theirs", "0.9"],
  ] as const)("and was settled by %s has that value", (choice, amps) => {
    const result = settled(AMPS, edited("x", "amps = 0.85", "amps = 0.9"), choice);
    expect(textOf(result)).toBe(edited("x", "amps = 0.85", `amps = ${amps}`));
  });

  it("conflicts on different lines and in different files, and one choice settles it", () => {
    const over = [...files(TEXT), { path: "site.conf", text: "[axis.x]\namps = 0.9\n" }];
    const result = merge(AMPS, over);
    expect(told(result)).toEqual([["x", "run_current", "0.85", "1.05", "0.9"]]);
    for (const [choice, amps] of [
      ["base", 0.85],
      ["ours", 1.05],
      ["theirs", 0.9],
    ] as const) {
      const done = settled(AMPS, over, choice);
      const { parameters } = check("", { files: done.files ?? [] });
      expect(parameters.find((one) => one.parameter === "run_current" && one.axis === "x")?.value).toBe(amps);
    }
  });

  it("by removing it here and changing it there is one conflict, with its lines", () => {
    const removed = TEXT.replace("corner = 12     # mm/s\n", "");
    const changed = edited("x", "corner = 12", "corner = 10");
    const result = merge(removed, changed);
    expect(told(result)).toEqual([["x", "corner_speed", "12", null, "10"]]);
    expect(result.conflicts[0]).toMatchObject({ kind: "lines", lines: { ours: { text: "" } } });
    expect(textOf(settled(removed, changed, "ours"))).toBe(removed);
    expect(textOf(settled(removed, changed, "theirs"))).toBe(changed);
  });

  it("in a key that the key table does not know is a conflict of that key", () => {
    const result = merge(
      edited("x", "colour = grey", "colour = blue"),
      edited("x", "colour = grey", "colour = red"),
    );
    expect(told(result)).toEqual([[null, "axis.x.colour", "grey", "blue", "red"]]);
  });

  it("in the lines of a comment is a conflict of those lines", () => {
    const [one, other] = [TEXT.replace("bench", "north"), TEXT.replace("bench", "south")];
    const { files: merged, conflicts } = merge(one, other);
    expect(merged).toBeNull();
    expect(conflicts).toMatchObject([
      { kind: "lines", places: [], lines: { base: { line: 1 }, ours: { text: "# north gantry\n" } } },
    ]);
  });

  it("by adding lines at one place may be both, ours first", () => {
    const add = (line: string) => TEXT.replace("colour = grey\n", `colour = grey\n${line}\n`);
    const [one, other] = [add("reversed = yes"), add("pulse = 2")];
    expect(merge(one, other).conflicts).toMatchObject([
      { kind: "lines", options: ["base", "ours", "theirs", "both"] },
    ]);
    expect(textOf(settled(one, other, "both"))).toBe(add("reversed = yes\npulse = 2"));
  });

  it("by adding the same parameter with one value in two notations is no conflict", () => {
    const add = (line: string) => TEXT.replace("colour = grey\n", `colour = grey\n${line}\n`);
    const result = merge(add("upper = 400"), add("upper = 0.4 m"));
    expect(result.conflicts).toEqual([]);
    expect(textOf(result)).toBe(textOf(merge(add("upper = 0.4 m"), add("upper = 400"))));
  });
});

describe("files", () => {
  const extra = (text: string) => ({ path: "extra.conf", text });

  it("that one side added or removed are there or gone", () => {
    const both = [...files(TEXT), extra("note = 1\n")];
    expect(merge(both, AMPS).files).toEqual([...files(AMPS), extra("note = 1\n")]);
    expect(merge(TEXT, both, {}, both).files).toEqual(files(TEXT));
  });

  it("that one side removed and the other changed are a conflict of the whole file", () => {
    const base = [...files(TEXT), extra("note = 1\n")];
    const changed = [...files(TEXT), extra("note = 2\n")];
    const result = merge(TEXT, changed, {}, base);
    expect(result.conflicts).toMatchObject([{ kind: "file", path: "extra.conf", lines: { ours: null } }]);
    expect(settled(TEXT, changed, "ours", base).files).toEqual(files(TEXT));
    expect(settled(TEXT, changed, "theirs", base).files).toEqual(changed);
  });

  it("come in the order of the side that changed the order, since later files override earlier ones", () => {
    const [one, two] = [extra("a = 1\n"), { path: "two.conf", text: "a = 2\n" }];
    expect(merge([one, two], [two, one], {}, [one, two]).files).toEqual([two, one]);
  });
});

describe("laws of the merge", { timeout: 60_000 }, () => {
  const edit = fc.constantFrom<[string, string, string]>(
    ["x", "amps = 0.85", "amps = 1.05"],
    ["x", "amps = 0.85", "amps = 850 mA"],
    ["x", "vmax = 300 ", "vmax = 0.5 m/s "],
    ["x", "vmax = 300 ", "vmax = 500 "],
    ["x", "corner = 12", "corner = 10"],
    ["x", "colour = grey", "colour = blue"],
    ["x", "subdivide = 16\n", "subdivide = 16\n\n# proved on the bench\n"],
    ["z", "acc = 200", "acc = 250"],
    ["z", "# mm/s^2", "# mm/s^2, vertical"],
    ["z", "corner = 1  ", "# corner = 1  "],
    ["z", "standby = 1.0   # A\n", ""],
  );
  const edits = fc
    .uniqueArray(edit, { maxLength: 7, selector: ([axis, was]) => axis + was })
    .map((list) => list.reduce((text, [axis, was, toBe]) => edited(axis, was, toBe, text), TEXT));
  const choice = fc.constantFrom<MergeChoice>("base", "ours", "theirs", "both");

  it("gives the other side where one side is unchanged", () => {
    fc.assert(
      fc.property(edits, (text) => {
        expect(merge(TEXT, text).files).toEqual(files(text));
        expect(merge(text, TEXT).files).toEqual(files(text));
        expect(merge(text, text).files).toEqual(files(text));
      }),
      { numRuns: 40 },
    );
  });

  it("does not depend on the order of the sides, and finds the same conflicts", () => {
    fc.assert(
      fc.property(edits, edits, (one, other) => {
        const [there, back] = [merge(one, other), merge(other, one)];
        expect(back.files).toEqual(there.files);
        expect(back.conflicts.map(({ id }) => id)).toEqual(there.conflicts.map(({ id }) => id));
      }),
      { numRuns: 100 },
    );
  });

  it("says of each parameter what the side that changed it says", () => {
    fc.assert(
      fc.property(edits, edits, (one, other) => {
        const result = merge(one, other);
        if (!result.files) return expect(result.conflicts.length).toBeGreaterThan(0);
        const [was, ours, theirs, now] = [TEXT, one, other, textOf(result) ?? ""].map(
          (text) =>
            new Map(check(text).parameters.map((value) => [`${value.axis} ${value.parameter}`, value.value])),
        );
        for (const key of new Set([...was!.keys(), ...ours!.keys(), ...theirs!.keys()])) {
          const wanted = ours!.get(key) === was!.get(key) ? theirs!.get(key) : ours!.get(key);
          expect(now!.get(key)).toBe(wanted);
        }
      }),
      { numRuns: 60 },
    );
  });

  it("comes to an end with any choices, and no line stands there that no text has", () => {
    fc.assert(
      fc.property(edits, edits, choice, (one, other, wanted) => {
        const result = settled(one, other, wanted === "both" ? "theirs" : wanted);
        const known = new Set([TEXT, one, other].flatMap((text) => text.split("\n")).map(bare));
        for (const line of (textOf(result) ?? "").split("\n")) expect(known).toContain(bare(line));
      }),
      { numRuns: 60 },
    );
  });

  /** A line without its value, which may come from another side than its comment. */
  function bare(line: string): string {
    return line.replace(/=\s*[^#]*/, "= ").replace(/#.*/, "");
  }
});
