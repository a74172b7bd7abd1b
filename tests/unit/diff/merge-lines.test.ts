import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { mergeRegions, type MergeRegion, type MergeSides } from "@/lib/diff/merge-lines";

const lines = fc.array(fc.constantFrom("a", "b", "c", "d", ""), { maxLength: 12 });

function drawn(sides: MergeSides): string[] {
  return mergeRegions(sides).map(({ kind, base, ours, theirs }) => {
    const of = (side: keyof MergeSides, range: MergeRegion["base"]) =>
      sides[side].slice(range.start, range.end).join("");
    return `${kind} ${of("base", base)}|${of("ours", ours)}|${of("theirs", theirs)}`;
  });
}

const cut = (text: string) => [...text];

describe("mergeRegions", () => {
  it.each([
    ["abc", "abc", "abc", ["same abc|abc|abc"]],
    ["abc", "aXc", "abc", ["same a|a|a", "ours b|X|b", "same c|c|c"]],
    ["abc", "abc", "ac", ["same a|a|a", "theirs b|b|", "same c|c|c"]],
    ["abc", "aXc", "aXc", ["same a|a|a", "agreed b|X|X", "same c|c|c"]],
    ["abc", "aXc", "aYc", ["same a|a|a", "conflict b|X|Y", "same c|c|c"]],
    ["abcd", "aXcd", "abYd", ["same a|a|a", "ours b|X|b", "theirs c|c|Y", "same d|d|d"]],
    ["ab", "aXb", "aYb", ["same a|a|a", "conflict |X|Y", "same b|b|b"]],
    ["abcd", "ad", "abXd", ["same a|a|a", "conflict bc||bX", "same d|d|d"]],
    ["ab", "bc", "ax", ["conflict ab|bc|ax"]],
    ["", "ab", "", ["ours |ab|"]],
  ])("%s → %s, %s", (base, ours, theirs, regions) =>
    expect(drawn({ base: cut(base), ours: cut(ours), theirs: cut(theirs) })).toEqual(regions),
  );
});

describe("laws of mergeRegions", () => {
  it("tiles all three texts, and calls each stretch by what happened to it", () => {
    fc.assert(
      fc.property(lines, lines, lines, (base, ours, theirs) => {
        const sides = { base, ours, theirs };
        const regions = mergeRegions(sides);
        for (const side of ["base", "ours", "theirs"] as const) {
          expect(
            regions.flatMap((region) => sides[side].slice(region[side].start, region[side].end)),
          ).toEqual(sides[side]);
          regions.forEach((region, index) =>
            expect(region[side].start).toBe(index === 0 ? 0 : regions[index - 1]![side].end),
          );
        }
        for (const { kind, ...region } of regions) {
          const [was, one, other] = (["base", "ours", "theirs"] as const).map((side) =>
            JSON.stringify(sides[side].slice(region[side].start, region[side].end)),
          );
          if (kind === "same") expect([one, other]).toEqual([was, was]);
          if (kind === "ours") expect([one === was, other]).toEqual([false, was]);
          if (kind === "theirs") expect([one, other === was]).toEqual([was, false]);
          if (kind === "agreed") expect([one === was, one]).toEqual([false, other]);
        }
      }),
    );
  });

  it("gives the same regions with the sides exchanged", () => {
    const other = {
      same: "same",
      agreed: "agreed",
      conflict: "conflict",
      ours: "theirs",
      theirs: "ours",
    } as const;
    fc.assert(
      fc.property(lines, lines, lines, (base, ours, theirs) => {
        const back = mergeRegions({ base, ours: theirs, theirs: ours });
        expect(
          back.map((region) => ({
            ...region,
            kind: other[region.kind],
            ours: region.theirs,
            theirs: region.ours,
          })),
        ).toEqual(mergeRegions({ base, ours, theirs }));
      }),
    );
  });

  it("cuts long texts with many equal lines as short ones are cut", () => {
    const base = Array.from({ length: 20_000 }, (_, index) => (index % 4 === 0 ? "" : `k = ${index}`));
    const [ours, theirs] = [[...base], [...base]];
    for (let index = 1; index < base.length; index += 1000) ours[index] = `ours ${index}`;
    for (let index = 501; index < base.length; index += 1000) theirs[index] = `theirs ${index}`;
    const kinds = mergeRegions({ base, ours, theirs }).map(({ kind }) => kind);
    expect(kinds.filter((kind) => kind !== "same")).toEqual(
      Array.from({ length: 40 }, (_, index) => (index % 2 === 0 ? "ours" : "theirs")),
    );
  });
});
