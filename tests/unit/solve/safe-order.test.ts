import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { safeOrder, type SafeOrder } from "@/lib/solve/safe-order";
import { assemblyWith, exampleAssembly, parametersOf, texts, type Texts } from "../rules/world";
import { caseOf, overLimitOf, anyAxis } from "./cases";

const roomy = assemblyWith((axis) => {
  axis.load = { ...axis.load, mass_kg: 1 };
  axis.mount = { softening_c: 100 };
  axis.driver!.set_point!.sense_resistor_rating_w = 1;
});

function orderOf(was: Texts, toBe: Texts, assembly = roomy): SafeOrder {
  return safeOrder({
    was: parametersOf(was, assembly),
    toBe: parametersOf(toBe, assembly),
    assembly,
    policy: DEFAULT_POLICY,
  });
}

const names = (order: SafeOrder) =>
  order.kind === "needless" ? [] : order.steps.map(({ parameters }) => parameters[0]!.parameter);

const current = (typed: number) => ({ typed, unit: "mA", factor: 1e-3, basis: "rms" as const });
const acceleration = (typed: number) => ({ typed, unit: "mm/s^2", factor: 1e-3 });

describe("a safe order", () => {
  it("is not needed for one value or none", () => {
    expect(orderOf(texts({}), texts({})).kind).toBe("needless");
    expect(orderOf(texts({}), texts({ run_current: current(700) })).kind).toBe("needless");
  });

  it("raises the current before the acceleration that needs it, and lowers it after", () => {
    const gentle = texts({ run_current: current(500), acceleration: acceleration(3000) });
    const brisk = texts({ run_current: current(900), acceleration: acceleration(14_000) });
    const up = orderOf(gentle, brisk);
    expect([up.kind, names(up)]).toEqual(["found", ["run_current", "acceleration"]]);
    const down = orderOf(brisk, gentle);
    expect([down.kind, names(down)]).toEqual(["found", ["acceleration", "run_current"]]);
  });

  it("says that there is none where scale and microsteps are wrong without each other, and names the check", () => {
    const order = orderOf(
      texts({}),
      texts({ microsteps: { typed: 32, unit: null }, steps_per_mm: { typed: 160, unit: "steps/mm" } }),
    );
    expect(order).toMatchObject({
      kind: "none",
      blocking: [{ ruleId: "steps-per-mm", axis: "x" }],
      tried: 2,
    });
  });

  it("reads a speed in steps/s with the scale of the moment", () => {
    const inSteps = (scale: number, speed: number) =>
      texts({
        microsteps: { typed: 16, unit: null },
        steps_per_mm: { typed: scale, unit: "steps/mm" },
        max_speed: { typed: speed, unit: "steps/s", factor: 1 / (scale * 1000) },
        corner_speed: { typed: 400, unit: "steps/s", factor: 1 / (scale * 1000) },
      });
    // 80 000 steps/s at 80 steps/mm are 1 m/s; at 40 steps/mm they would be 2 m/s, more torque than there is.
    const order = orderOf(
      inSteps(80.2, 60_000),
      inSteps(80, 20_000),
      assemblyWith((axis) => {
        axis.mount = { softening_c: 90 };
      }),
    );
    expect(order.kind).toBe("found");
  });

  it("moves the values of one key together", () => {
    const assembly = exampleAssembly();
    const shared = (typed: number) =>
      parametersOf(texts({ run_current: current(typed) }), assembly).map((value) =>
        value.parameter === "hold_current"
          ? {
              ...value,
              unit: "A",
              basis: "rms" as const,
              typed: { value: typed, unit: "mA" },
              value: typed / 1000,
              source: { ...value.source, start: 0 },
            }
          : value,
      );
    const order = safeOrder({ was: shared(600), toBe: shared(500), assembly, policy: DEFAULT_POLICY });
    expect(order.kind).toBe("needless");
  });

  it("passes the checks in every state of an order that it gives", () => {
    const seen = { found: 0, none: 0 };
    fc.assert(
      fc.property(anyAxis, anyAxis, (one, other) => {
        const was = caseOf([one]);
        const toBe = caseOf([
          {
            ...other,
            mass: one.mass,
            friction: one.friction,
            teeth: one.teeth,
            incline: one.incline,
            softening: one.softening,
            inDecimals: one.inDecimals,
          },
        ]);
        const { assembly, policy } = was;
        const order = safeOrder({ was: was.parameters, toBe: toBe.parameters, assembly, policy });
        if (order.kind !== "found") {
          seen.none += 1;
          return;
        }
        seen.found += 1;
        const atStart = new Set(overLimitOf(was));
        const typed = new Map<string, number>();
        for (const { source, toBe: next } of order.steps.slice(0, -1)) {
          typed.set(`${source.path}\u0000${source.start}`, next!.value);
          expect(overLimitOf(was, typed).filter((key) => !atStart.has(key))).toEqual([]);
        }
      }),
      { numRuns: 60, seed: 3 },
    );
    expect(seen.found).toBeGreaterThan(5);
    expect(seen.none).toBeGreaterThan(0);
  }, 60_000);
});
