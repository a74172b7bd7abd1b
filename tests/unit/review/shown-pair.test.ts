import { describe, expect, it } from "vitest";
import { shownPair } from "@/lib/review/shown-pair";

describe("shownPair", () => {
  it("gives ratios two decimals, temperatures whole degrees, and the unit once", () => {
    expect(shownPair(0.9134, 0.0687, "")).toBe("0.91 → 0.07");
    expect(shownPair(51.2, 56.8, "°C")).toBe("51 → 57 °C");
    expect(shownPair(0.3, 0.25, "m/s")).toBe("300 → 250 mm/s");
    expect(shownPair(24_000, 40_000, "Hz")).toBe("24 → 40 kHz");
  });

  it("names both units where they differ", () => {
    expect(shownPair(800, 40_000, "Hz")).toBe("800 Hz → 40 kHz");
  });

  it("takes as many digits as tell the values apart", () => {
    expect(shownPair(51.2, 51.4, "°C")).toBe("51.2 → 51.4 °C");
    expect(shownPair(80, 80.004, "1/mm")).toBe("80 → 80.004 1/mm");
  });

  it("says the later value alone where the earlier one is not known or reads the same", () => {
    expect(shownPair(null, 0.25, "m/s")).toBe("250 mm/s");
    expect(shownPair(0.25, 0.25, "m/s")).toBe("250 mm/s");
  });
});
