import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Finding } from "@/lib/domain/findings";
import { LEVELS, type Level } from "@/lib/domain/levels";
import { compareFindings, isGraver } from "@/lib/review/compare-findings";
import { finding } from "./support/findings";

const at = (ruleId: string, level: Level, axis: string | null = "x", value = 1): Finding =>
  finding({ ruleId, level, axis, value });

describe("compareFindings", () => {
  it("parts what is graver or not there before from what is better and what is the same", () => {
    const before = [
      at("torque-margin", "within"),
      at("mount-temperature", "near"),
      at("step-rate", "over"),
      at("corner-speed", "near"),
      at("hold-torque", "over", "z"),
      at("resonance", "near"),
    ];
    const after = [
      at("torque-margin", "over"),
      at("mount-temperature", "over"),
      at("step-rate", "near"),
      at("corner-speed", "near", "X", 2),
      at("set-point", "cannot"),
      at("resonance", "within"),
    ];
    const { fresh, cleared, unchanged } = compareFindings(before, after);
    expect(fresh).toEqual([after[0], after[1], after[4]]);
    expect(cleared).toEqual([
      { was: before[2], toBe: after[2] },
      { was: before[5], toBe: after[5] },
      { was: before[4], toBe: null },
    ]);
    expect(unchanged).toEqual([after[3]]);
  });

  it("never takes cannot check for an improvement", () => {
    const lost = at("torque-margin", "cannot");
    expect(compareFindings([at("torque-margin", "over")], [lost]).fresh).toEqual([lost]);
    expect(compareFindings([lost], [at("torque-margin", "within")]).cleared).toHaveLength(1);
    expect(compareFindings([lost], [at("torque-margin", "near")]).fresh).toHaveLength(1);
  });

  it("pairs several findings of one check gravest with gravest", () => {
    const { fresh, cleared, unchanged } = compareFindings(
      [at("set-point", "near"), at("set-point", "over")],
      [at("set-point", "over"), at("set-point", "over")],
    );
    expect([fresh.length, cleared.length, unchanged.length]).toEqual([1, 0, 1]);
  });
});

const anyFindings = fc.array(
  fc.record({
    ruleId: fc.constantFrom("a", "b"),
    level: fc.constantFrom(...LEVELS),
    axis: fc.constantFrom("x", "y", null),
  }),
  { maxLength: 8 },
);

describe("laws of compareFindings", () => {
  it("finds nothing new and nothing cleared between equal evaluations", () => {
    fc.assert(
      fc.property(anyFindings, (list) => {
        const findings = list.map((place) => at(place.ruleId, place.level, place.axis));
        const { fresh, cleared, unchanged } = compareFindings(findings, findings);
        expect([fresh, cleared]).toEqual([[], []]);
        expect(unchanged).toHaveLength(findings.filter(({ level }) => level !== "within").length);
      }),
    );
  });

  it("keeps every later finding that is not within limits in sight", () => {
    fc.assert(
      fc.property(anyFindings, anyFindings, (one, other) => {
        const [before, after] = [one, other].map((list) =>
          list.map((place) => at(place.ruleId, place.level, place.axis)),
        );
        const { fresh, cleared, unchanged } = compareFindings(before ?? [], after ?? []);
        const seen = [...fresh, ...unchanged, ...cleared.map(({ toBe }) => toBe)];
        for (const later of after ?? []) if (later.level !== "within") expect(seen).toContain(later);
      }),
    );
  });

  it("never calls both directions of a known level an improvement or both a worsening", () => {
    const known: Level[] = ["over", "near", "within"];
    for (const one of known)
      for (const other of known) if (one !== other) expect(isGraver(one, other)).toBe(!isGraver(other, one));
  });
});
