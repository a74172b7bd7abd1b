import { parse as parseOutside } from "csv-parse/sync";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { cutRecords, delimiterOf } from "@/lib/parsers/csv/records";
import { parseText } from "@/lib/parsers/parse-text";
import { Pieces } from "@/lib/parsers/pieces";
import { RUNS, TIMEOUT } from "./arbitrary-texts";
import { csvText } from "./arbitrary-plain";
import { plainValue } from "./plain-values";

function parse(text: string) {
  return parseText({ path: "a.csv", text, format: "csv" });
}

function values(text: string): [string, unknown][] {
  return parse(text).entries.map(({ key, value }) => [key, plainValue(value)]);
}

function fieldsOf(text: string): string[][] {
  const { records } = cutRecords(text, delimiterOf(text), new Pieces(16));
  return records.map((fields) => fields.map(({ said }) => said));
}

describe("a table", () => {
  // RFC 4180, section 2, rules 1 to 7.
  it.each<[string, string[][]]>([
    [
      "aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n",
      [
        ["aaa", "bbb", "ccc"],
        ["zzz", "yyy", "xxx"],
      ],
    ],
    [
      "aaa,bbb,ccc\r\nzzz,yyy,xxx",
      [
        ["aaa", "bbb", "ccc"],
        ["zzz", "yyy", "xxx"],
      ],
    ],
    [
      '"aaa","bbb","ccc"\r\nzzz,yyy,xxx',
      [
        ["aaa", "bbb", "ccc"],
        ["zzz", "yyy", "xxx"],
      ],
    ],
    [
      '"aaa","b\r\nbb","ccc"\r\nzzz,yyy,xxx',
      [
        ["aaa", "b\r\nbb", "ccc"],
        ["zzz", "yyy", "xxx"],
      ],
    ],
    ['"aaa","b""bb","ccc"', [["aaa", 'b"bb', "ccc"]]],
  ])("%j has the fields that RFC 4180 says", (text, fields) => {
    expect(fieldsOf(text)).toEqual(fields);
  });

  it.each<[string, string, [string, unknown][]]>([
    [
      "two columns",
      "run_ma,800\naccel,3000\n",
      [
        ["run_ma", 800],
        ["accel", 3000],
      ],
    ],
    ["two columns with heads", "name;value\nrun_ma;800", [["run_ma", 800]]],
    [
      "name, value and unit",
      "key,value,unit,note\nrun,800,mA,rms\nlabel,x,,",
      [
        ["run", "800 mA"],
        ["label", "x"],
      ],
    ],
    [
      "name, value and unit without heads",
      "run,800,mA\naccel,3000,mm/s^2",
      [
        ["run", "800 mA"],
        ["accel", "3000 mm/s^2"],
      ],
    ],
    [
      "rows and columns",
      "axis,run_ma,hold_ma\nx,800,400\nz,650,\n",
      [
        ["x.run_ma", 800],
        ["x.hold_ma", 400],
        ["z.run_ma", 650],
      ],
    ],
    [
      "rows without heads",
      "x,800,400\nz,650,325",
      [
        ["x.0", 800],
        ["x.1", 400],
        ["z.0", 650],
        ["z.1", 325],
      ],
    ],
  ])("of %s gives each value its key", (_, text, said) => {
    expect(values(text)).toEqual(said);
  });

  it.each<[string, string, number]>([
    ['a,b\n"open,1', "unclosed-quote", 2],
    ['a,b\n"x"y,1', "unreadable-line", 2],
    ["a,1\nb,2,3", "not-standard", 2],
    ["a,1\na,2", "duplicate-key", 1],
  ])("%j names the place of what is not as it ought to be", (text, code, line) => {
    expect(parse(text).diagnostics.map((one) => [one.code, one.span?.line])).toContainEqual([code, line]);
  });

  /**
   * Where `csv-parse` differs: it keeps blanks around fields unless told to trim (blanks are no part of a value here),
   * refuses a quote inside a bare field, and refuses rows of another length unless told not to.
   */
  it("has the same fields for an outside reader", { timeout: TIMEOUT }, () => {
    fc.assert(
      fc.property(csvText, ({ text }) => {
        const delimiter = String.fromCharCode(delimiterOf(text));
        const outside = parseOutside(text, {
          bom: true,
          delimiter,
          trim: true,
          relax_column_count: true,
        }) as string[][];
        expect(fieldsOf(text)).toEqual(outside);
      }),
      RUNS,
    );
  });
});
