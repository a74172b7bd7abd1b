import { parse as parseOutside } from "dotenv";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parseText } from "@/lib/parsers/parse-text";
import { RUNS, TIMEOUT } from "./arbitrary-texts";
import { envText } from "./arbitrary-plain";
import { plainValue } from "./plain-values";

function parse(text: string) {
  return parseText({ path: ".env", text, format: "env" });
}

describe("shell assignments", () => {
  it("read names, values, comments and disabled names", () => {
    const text =
      "export RUN=800 # rms\nHOLD='4 # 0'\n# JERK=20\n# a note = of words\nNOTE=\"two\nlines\"\nEMPTY=\nSPACED = 1";
    expect(
      parse(text).entries.map(({ key, value, disabled, comment }) => [
        key,
        plainValue(value),
        disabled,
        comment,
      ]),
    ).toEqual([
      ["RUN", 800, false, "rms"],
      ["HOLD", "4 # 0", false, null],
      ["JERK", 20, true, null],
      ["NOTE", "two\nlines", false, null],
      ["EMPTY", null, false, null],
      ["SPACED", 1, false, null],
    ]);
  });

  it.each<[string, string, number]>([
    ["A=1\nif [ x ]; then\nB=2", "unreadable-line", 2],
    ['A="open\nB=2', "unclosed-quote", 1],
    ["A=1\nA=2", "duplicate-key", 1],
    ["A=$HOME/x", "not-standard", 1],
    ['A="x" y', "unreadable-line", 1],
  ])("%j names the place of what is not read as it stands", (text, code, line) => {
    expect(parse(text).diagnostics.map((one) => [one.code, one.span?.line])).toEqual([[code, line]]);
  });

  /**
   * Where `dotenv` differs, and what is left out of the comparison:
   * - `#` inside a bare value begins a comment there; in a shell, and here, only behind a blank;
   * - escaped quotes between double quotes stay escaped there;
   * - a CR alone is turned into LF there;
   * - numbers and truth values are texts there, so spellings are compared.
   */
  it("say the same as an outside reader", { timeout: TIMEOUT }, () => {
    fc.assert(
      fc.property(envText, ({ text }) => {
        fc.pre(!text.includes("plain#word") && !text.includes('\\"') && !/\r(?!\n)/.test(text));
        fc.pre(!text.includes("__proto__"));
        const own = parse(text).entries.filter(({ disabled, shadowed }) => !disabled && !shadowed);
        const said = own.map(({ key, raw, value }) => [key, value.kind === "text" ? value.value : raw]);
        const outside = parseOutside(text.replace(/^\ufeff/, "").replaceAll("\r\n", "\n"));
        expect(new Map(said as [string, string][])).toEqual(new Map(Object.entries(outside)));
      }),
      RUNS,
    );
  });
});
