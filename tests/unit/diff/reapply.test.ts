import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { reapplyText } from "@/lib/diff/reapply";

const BASE = "[axis.x]\nrun = 800\nacc = 6000\ncorner = 12\n[axis.y]\nrun = 800\nacc = 6000\ncorner = 12\n";

describe("reapplyText", () => {
  it("gives the edited text back when the base has not moved", () => {
    const edited = BASE.replace("acc = 6000", "acc = 8000");
    expect(reapplyText({ oldBase: BASE, edited, newBase: BASE })).toEqual({ text: edited, notFitting: [] });
  });

  it("keeps what the new base changed elsewhere, next to the edit too", () => {
    const edited = BASE.replace("acc = 6000", "acc = 8000");
    const newBase = BASE.replace("corner = 12", "corner = 10");
    const { text, notFitting } = reapplyText({ oldBase: BASE, edited, newBase });
    expect(text).toBe(BASE.replace("acc = 6000", "acc = 8000").replace("corner = 12", "corner = 10"));
    expect(notFitting).toEqual([]);
  });

  it("does not move an edit into another section that reads the same", () => {
    const edited = BASE.replace("acc = 6000", "acc = 8000");
    const newBase = BASE.replace("acc = 6000", "acc = 5000");
    expect(reapplyText({ oldBase: BASE, edited, newBase })).toEqual({
      text: newBase,
      notFitting: [{ line: 3, text: "acc = 8000\n", kind: "changed" }],
    });
  });

  it("counts an edit that the new base already holds as made", () => {
    const edited = BASE.replace("acc = 6000", "acc = 8000").replace("corner = 12", "corner = 14");
    const newBase = BASE.replace("acc = 6000", "acc = 8000").replace("run = 800", "run = 850");
    const { text, notFitting } = reapplyText({ oldBase: BASE, edited, newBase });
    expect(text).toBe(newBase.replace("corner = 12", "corner = 14"));
    expect(notFitting).toEqual([]);
  });

  it("adds lines between the lines that they were added between, though one of them was rewritten", () => {
    const edited = BASE.replace("acc = 6000\n", "acc = 6000\n# proved on the bench\n");
    const newBase = BASE.replace("acc = 6000", "acc = 5000");
    expect(reapplyText({ oldBase: BASE, edited, newBase })).toEqual({
      text: newBase.replace("acc = 5000\n", "acc = 5000\n# proved on the bench\n"),
      notFitting: [],
    });
  });

  it("shows added lines whose place is gone, and removed lines that have changed", () => {
    const edited = BASE.replace("acc = 6000\n", "acc = 6000\n# proved\n").replace("run = 800\n", "");
    const newBase = BASE.replace("run = 800\nacc = 6000\n", "run = 900\n");
    expect(reapplyText({ oldBase: BASE, edited, newBase })).toEqual({
      text: newBase,
      notFitting: [
        { line: 2, text: "run = 800\n", kind: "removed" },
        { line: 3, text: "# proved\n", kind: "added" },
      ],
    });
  });

  it("gives reapplied lines the line ends of the new base and closes a last line that is last no more", () => {
    const result = reapplyText({ oldBase: "a\nb", edited: "a\nB\nc", newBase: "a\r\nb" });
    expect(result).toEqual({ text: "a\r\nB\r\nc", notFitting: [] });
  });
});

const lines = fc.array(fc.constantFrom("a", "b", "c", "d", ""), { maxLength: 12 });
const text = lines.map((items) => items.map((line) => `${line}\n`).join(""));

describe("laws of reapplyText", () => {
  it("is the edited text on an unmoved base, and the new base where nothing was edited", () => {
    fc.assert(
      fc.property(text, text, (one, other) => {
        expect(reapplyText({ oldBase: one, edited: other, newBase: one })).toEqual({
          text: other,
          notFitting: [],
        });
        expect(reapplyText({ oldBase: one, edited: one, newBase: other })).toEqual({
          text: other,
          notFitting: [],
        });
      }),
    );
  });

  it("leaves an edit that both sides made as it stands", () => {
    fc.assert(
      fc.property(text, text, (one, other) => {
        expect(reapplyText({ oldBase: one, edited: other, newBase: other })).toEqual({
          text: other,
          notFitting: [],
        });
      }),
    );
  });

  it("never loses a line of the new base that the edit did not touch", () => {
    fc.assert(
      fc.property(text, text, text, (oldBase, edited, newBase) => {
        const before = newBase.split("\n").filter((line) => !oldBase.includes(`${line}\n`));
        const after = reapplyText({ oldBase, edited, newBase }).text.split("\n");
        for (const line of before) expect(after).toContain(line);
      }),
    );
  });
});
