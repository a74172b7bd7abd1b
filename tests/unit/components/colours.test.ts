import { describe, expect, it } from "vitest";
import { COLOURS, type ColourName } from "@/components/ui/colours";
import { contrast, luminance } from "./contrast";

const SCHEMES = ["light", "dark"] as const;

/** Colours that letters are set in. */
const TEXT_COLOURS: readonly ColourName[] = [
  "ink",
  "grey",
  "blueprint",
  "copper",
  "over",
  "near",
  "within",
  "cannot",
];

/** Grounds that letters stand on. */
const GROUND_COLOURS: readonly ColourName[] = ["paper", "sheet", "blueprint-wash", "copper-wash"];

/** Neither set in nor written on, or proved by a test of their own below. */
const OTHERS: readonly ColourName[] = ["hairline", "edge", "copper-solid", "copper-pressed", "on-copper"];

it("every colour of the table has a role", () => {
  expect([...TEXT_COLOURS, ...GROUND_COLOURS, ...OTHERS].sort()).toEqual(Object.keys(COLOURS).sort());
});

describe("contrast", () => {
  it("is 21 between black and white and 1 between equals (WCAG 2.2)", () => {
    expect(contrast("#000000", "#FFFFFF")).toBeCloseTo(21, 10);
    expect(contrast("#777777", "#777777")).toBe(1);
    expect(luminance("#FFFFFF")).toBeCloseTo(1, 10);
  });

  it("gives #767676 on white 1.05/(0.1812 + 0.05), reckoned by hand from the definition", () => {
    const channel = ((0x76 / 255 + 0.055) / 1.055) ** 2.4;
    expect(contrast("#767676", "#FFFFFF")).toBeCloseTo(1.05 / (channel + 0.05), 10);
    expect(contrast("#FFFFFF", "#767676")).toBeCloseTo(4.54, 2);
  });
});

describe.each(SCHEMES)("the %s scheme", (scheme) => {
  const pairs = TEXT_COLOURS.flatMap((text) => GROUND_COLOURS.map((ground) => ({ text, ground })));

  it.each(pairs)("sets $text on $ground at 4.5:1 or better", ({ text, ground }) => {
    expect(contrast(COLOURS[text][scheme], COLOURS[ground][scheme])).toBeGreaterThanOrEqual(4.5);
  });

  it.each(["copper-solid", "copper-pressed"] as const)(
    "sets the words of a primary act on %s at 4.5:1",
    (name) => {
      expect(contrast(COLOURS["on-copper"][scheme], COLOURS[name][scheme])).toBeGreaterThanOrEqual(4.5);
    },
  );

  it.each(["paper", "sheet"] as const)("draws the edges of fields on %s at 3:1 or better", (ground) => {
    expect(contrast(COLOURS.edge[scheme], COLOURS[ground][scheme])).toBeGreaterThanOrEqual(3);
  });
});
