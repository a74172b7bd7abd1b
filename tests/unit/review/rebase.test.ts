import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { rebaseEdits } from "@/lib/review/rebase";
import { ASSEMBLY, KEY_TABLE, TEXT, check, edited, files } from "./support/gantry";

function rebase(proposal: string, newBase: string) {
  return rebaseEdits({
    oldBase: files(TEXT),
    edited: files(proposal),
    newBase: files(newBase),
    keyTable: KEY_TABLE,
    assembly: ASSEMBLY,
  });
}

const named = (list: readonly { axis: string | null; parameter: string }[]) =>
  list.map(({ axis, parameter }) => `${axis} ${parameter}`);

describe("rebaseEdits", () => {
  it("makes parameter edits again where the new base still holds the old values", () => {
    const newBase = edited("z", "acc = 200", "acc = 180");
    const proposal = edited("x", "amps = 0.85", "amps = 1.050");
    const result = rebase(proposal, newBase);
    expect(result.files[0]?.text).toBe(edited("x", "amps = 0.85", "amps = 1.050", newBase));
    expect(named(result.reapplied)).toEqual(["x run_current"]);
    expect([result.notFitting, result.textNotFitting, result.alreadyThere]).toEqual([[], [], []]);
  });

  it("shows an edit whose value the new base has moved, and keeps the new base's value", () => {
    const newBase = edited("x", "amps = 0.85", "amps = 0.9");
    const proposal = edited("x", "amps = 0.85", "amps = 1.05", edited("x", "corner = 12", "corner = 10"));
    const result = rebase(proposal, newBase);
    expect(result.files[0]?.text).toBe(edited("x", "corner = 12", "corner = 10", newBase));
    expect(result.notFitting).toMatchObject([
      {
        axis: "x",
        parameter: "run_current",
        was: { value: 0.85 },
        wanted: { value: 1.05 },
        now: { value: 0.9 },
        reason: "The new baseline has another value for it than the proposal started from.",
      },
    ]);
    expect(result.textNotFitting).toEqual([]);
  });

  it("converts an edit where the new base writes the same value in another unit", () => {
    const newBase = edited("x", "vmax = 300 ", "vmax = 0.3 m/s ");
    const result = rebase(edited("x", "vmax = 300", "vmax = 500"), newBase);
    expect(named(result.reapplied)).toEqual(["x max_speed"]);
    const speed = check(result.files[0]?.text ?? "").parameters.find(
      ({ axis, parameter }) => axis === "x" && parameter === "max_speed",
    );
    expect(speed?.value).toBeCloseTo(0.5, 9);
    expect(result.files[0]?.text).toContain("vmax = 0.5 m/s ");
  });

  it("makes comments and other keys again though a value beside them was edited", () => {
    const proposal = edited("x", "acc = 6000      # mm/s^2", "acc = 8000      # proved on the bench").replace(
      "colour = grey",
      "colour = blue\nlabel = two",
    );
    const newBase = edited("x", "vmax = 300", "vmax = 250");
    const result = rebase(proposal, newBase);
    expect(result.files[0]?.text).toBe(edited("x", "vmax = 300", "vmax = 250", proposal));
    expect(result.textNotFitting).toEqual([]);
  });

  it("shows other edits of the text that no longer fit", () => {
    const result = rebase(
      TEXT.replace("colour = grey", "colour = blue"),
      TEXT.replace("colour = grey", "colour = red"),
    );
    expect(result.files[0]?.text).toContain("colour = red");
    expect(result.textNotFitting).toEqual([
      { path: "gantry.conf", line: 13, text: "colour = blue\n", kind: "changed" },
    ]);
  });

  it("reports a value that the new base already has, and one that it no longer states", () => {
    const proposal = edited("x", "corner = 12", "corner = 10", edited("x", "acc = 6000", "acc = 8000"));
    const newBase = edited("x", "corner = 12     # mm/s\n", "", edited("x", "acc = 6000", "acc = 8000"));
    const result = rebase(proposal, newBase);
    expect(named(result.alreadyThere)).toEqual(["x acceleration"]);
    expect(result.notFitting).toMatchObject([
      { parameter: "corner_speed", now: null, reason: "The new baseline no longer states it." },
    ]);
    expect(result.files[0]?.text).toBe(newBase);
  });

  it("makes added and removed parameters again as lines of the text", () => {
    const proposal = TEXT.replace("colour = grey\n", "colour = grey\nreversed = yes\n").replace(
      "corner = 1      # mm/s\n",
      "",
    );
    const result = rebase(proposal, edited("x", "amps = 0.85", "amps = 0.9"));
    expect(named(result.reapplied)).toEqual(["x direction_reversed", "z corner_speed"]);
    expect(result.files[0]?.text).toBe(edited("x", "amps = 0.85", "amps = 0.9", proposal));
  });

  it("tells a removal that does not fit as a parameter and as a line", () => {
    const result = rebase(
      TEXT.replace("corner = 1      # mm/s\n", ""),
      edited("z", "corner = 1      # mm/s", "corner = 2      # mm/s"),
    );
    expect(result.notFitting).toMatchObject([
      { parameter: "corner_speed", wanted: null, now: { value: 0.002 } },
    ]);
    expect(result.textNotFitting).toMatchObject([{ kind: "removed", text: "corner = 1      # mm/s\n" }]);
  });

  it("carries added files over and shows edits of a file that is gone", () => {
    const extra = { path: "extra.conf", text: "note = new\n" };
    const result = rebaseEdits({
      oldBase: [...files(TEXT), { path: "old.conf", text: "a = 1\n" }],
      edited: [...files(TEXT), { path: "old.conf", text: "a = 2\n" }, extra],
      newBase: files(TEXT),
      keyTable: KEY_TABLE,
      assembly: ASSEMBLY,
    });
    expect(result.files.map(({ path }) => path)).toEqual(["gantry.conf", "extra.conf"]);
    expect(result.textNotFitting).toEqual([{ path: "old.conf", line: 1, text: "a = 2\n", kind: "changed" }]);
  });
});

describe("laws of rebaseEdits", { timeout: 60_000 }, () => {
  const edit = fc.constantFrom<[string, string, string]>(
    ["x", "amps = 0.85", "amps = 1.05"],
    ["x", "vmax = 300 ", "vmax = 0.5 m/s "],
    ["x", "corner = 12", "corner = 10"],
    ["x", "colour = grey", "colour = blue"],
    ["z", "acc = 200", "acc = 250"],
    ["z", "corner = 1  ", "# corner = 1  "],
  );
  const edits = fc
    .uniqueArray(edit, { maxLength: 6 })
    .map((list) => list.reduce((text, [axis, was, toBe]) => edited(axis, was, toBe, text), TEXT));

  it("gives the proposal back on an unmoved base, and the new base for an empty proposal", () => {
    fc.assert(
      fc.property(edits, (text) => {
        expect(rebase(text, TEXT).files[0]?.text).toBe(text);
        expect(rebase(TEXT, text).files[0]?.text).toBe(text);
      }),
      { numRuns: 40 },
    );
  });

  it("tells every parameter edit once: made again, already there, or not fitting", () => {
    fc.assert(
      fc.property(edits, edits, (proposal, newBase) => {
        const result = rebase(proposal, newBase);
        const told = named([...result.reapplied, ...result.alreadyThere, ...result.notFitting]);
        expect(new Set(told).size).toBe(told.length);
        const final = new Map(
          check(result.files[0]?.text ?? "").parameters.map((v) => [`${v.axis} ${v.parameter}`, v]),
        );
        for (const wish of [...result.reapplied, ...result.alreadyThere])
          expect(final.get(`${wish.axis} ${wish.parameter}`)?.value).toBe(wish.wanted?.value);
        for (const wish of result.notFitting)
          expect(final.get(`${wish.axis} ${wish.parameter}`)?.value).toBe(wish.now?.value);
      }),
      { numRuns: 60 },
    );
  });
});
