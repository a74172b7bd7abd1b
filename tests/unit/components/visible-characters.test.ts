import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { hasHidden, visibleBlanks, visibleRuns } from "@/components/revision/visible-characters";

function hiddenOf(line: string): string[] {
  return visibleRuns(line).flatMap((run) => (run.kind === "hidden" ? [`${run.codePoint} ${run.name}`] : []));
}

describe("visibleRuns", () => {
  it.each([
    ["a\u202eb", "U+202E right-to-left override"],
    ["a\u200bb", "U+200B zero-width space"],
    ["a\u00a0b", "U+00A0 no-break space"],
    ["a\u2069b", "U+2069 end of an isolate"],
    ["a\u3000b", "U+3000 unusual space"],
    ["a\u0007b", "U+0007 control character"],
    ["a\u{e0041}b", "U+E0041 hidden character"],
    ["a\ud800b", "U+D800 control character"],
  ])("names what hides in %j", (line, told) => {
    expect(hiddenOf(line)).toEqual([told]);
  });

  it("leaves blanks, tabs, letters, signs and pictures alone", () => {
    expect(hiddenOf("\tvmax = 500 ; µm, Ω, é, 速度, 🛠")).toEqual([]);
  });

  it("finds the first character again after it was asked about another line", () => {
    expect(hasHidden("some\u200bthing")).toBe(true);
    expect(hiddenOf("\u200bx")).toEqual(["U+200B zero-width space"]);
  });

  it("loses and adds nothing", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary" }), (line) => {
        expect(
          visibleRuns(line)
            .map(({ text }) => text)
            .join(""),
        ).toBe(line);
        expect(hasHidden(line)).toBe(visibleRuns(line).some(({ kind }) => kind === "hidden"));
      }),
    );
  });
});

describe("visibleBlanks", () => {
  it("draws blanks and tabs", () => {
    expect(visibleBlanks(" \t ")).toBe("·→\t·");
  });
});
