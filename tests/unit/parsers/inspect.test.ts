import { describe, expect, it } from "vitest";
import { inspectText } from "@/lib/parsers/inspect";

describe("a text", () => {
  it("without unusual characters has nothing to report", () => {
    expect(inspectText("\ufeffa = 1\t; Größe 5 µm² 日本 😀\r\nb = 2\r")).toEqual([]);
  });

  it.each([
    ["run\u200b_ma", "hidden-character", "warning", "a zero-width space (U+200B)"],
    ["run\u00ad_ma", "hidden-character", "warning", "a soft hyphen (U+00AD)"],
    ["run\u2060_ma", "hidden-character", "warning", "a word joiner (U+2060)"],
    ["run\ufeff_ma", "hidden-character", "warning", "a byte order mark inside the text (U+FEFF)"],
    ["run\u{e0041}_ma", "hidden-character", "warning", "a hidden character (U+E0041)"],
    ["run\ufe0f_ma", "hidden-character", "warning", "a hidden character (U+FE0F)"],
    ["run\u00a0_ma", "hidden-character", "note", "a no-break space (U+00A0)"],
    ["run\u202e_ma", "bidirectional-character", "warning", "a right-to-left override (U+202E)"],
    ["run\u2066_ma", "bidirectional-character", "warning", "a left-to-right isolate (U+2066)"],
    ["run\u200f_ma", "bidirectional-character", "warning", "a right-to-left mark (U+200F)"],
    ["run\u061c_ma", "bidirectional-character", "warning", "(U+061C)"],
    ["run\u0000_ma", "control-character", "warning", "a zero character (U+0000)"],
    ["run\u0007_ma", "control-character", "warning", "a control character (U+0007)"],
    ["run\u0085_ma", "control-character", "warning", "a next-line character (U+0085)"],
    ["run\u007f_ma", "control-character", "warning", "a delete character (U+007F)"],
    ["run\ud800_ma", "control-character", "warning", "half of a surrogate pair (U+D800)"],
  ])("with %j has it named with its place", (line, code, severity, name) => {
    const [found, ...more] = inspectText(`a = 1\r\n${line} = 3`);
    expect(more).toEqual([]);
    expect(found).toMatchObject({ code, severity, span: { line: 2, column: 4 } });
    expect(found?.message).toContain(`Line 2, column 4 has `);
    expect(found?.message).toContain(name);
    expect(found?.message).toContain("It is kept");
  });

  it("full of them has a hundred named and the rest counted", () => {
    expect(inspectText("\u200b".repeat(1000))).toHaveLength(101);
  });
});
