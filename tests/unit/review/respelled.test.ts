import { describe, expect, it } from "vitest";
import { respelled } from "@/lib/review/respelled";
import { check, edited, TEXT } from "./support/gantry";

const between = (toBe: string) => respelled(check(TEXT), check(toBe));

describe("respelled", () => {
  it("names a value that is written in another unit or notation and means the same", () => {
    const unit = edited("x", "vmax = 300 ", "vmax = 0.3 m/s ");
    const both = edited("z", "acc = 200 ", "acc = 2.0e2 ", unit);
    expect(between(both)).toMatchObject([
      {
        axis: "x",
        parameter: "max_speed",
        was: { raw: "300", line: 10 },
        toBe: { raw: "0.3 m/s", line: 10 },
      },
      { axis: "z", parameter: "acceleration", was: { raw: "200" }, toBe: { raw: "2.0e2" } },
    ]);
  });

  it("names neither a changed value, nor one that only moved, nor one that came or went", () => {
    expect(between(edited("x", "vmax = 300 ", "vmax = 301 "))).toEqual([]);
    expect(between(`\n\n${TEXT}`)).toEqual([]);
    expect(between(edited("x", "corner = 12     # mm/s\n", ""))).toEqual([]);
  });
});
