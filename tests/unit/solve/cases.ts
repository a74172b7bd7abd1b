import fc from "fast-check";
import type { Assembly } from "@/lib/domain/assembly";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import type { ParameterValue } from "@/lib/domain/values";
import { RULES } from "@/lib/rules/table";
import { ruleContext } from "@/lib/rules/view";
import { placeKey, type CounterProposal, type SolveInput } from "@/lib/solve/types";
import { withTyped } from "@/lib/solve/with-values";
import { exampleAssembly, exampleAxis, parametersOf, type Texts } from "../rules/world";

export const LONG = process.env["KEEPSTEP_LONG"] === "1";

/** Checks over limit with some numbers typed anew, by the bare verdicts. */
export function overLimitOf(input: SolveInput, typed: ReadonlyMap<string, number> = new Map()): string[] {
  const context = ruleContext({ ...input, parameters: withTyped(input.parameters, typed) });
  return RULES.flatMap((rule) =>
    rule
      .judge(context)
      .flatMap(({ axis, assessment }) =>
        assessment.ok && assessment.level === "over" ? [placeKey({ ruleId: rule.id, axis })] : [],
      ),
  );
}

/** What the moves of an answer type, by place. */
export function typedBy(answer: CounterProposal): Map<string, number> {
  return new Map(answer.moves.map(({ source, toBe }) => [`${source.path}\u0000${source.start}`, toBe]));
}

const pick = (low: number, high: number) => fc.integer({ min: low, max: high });

/** A machine whose text is likely to be over limit: too much current, too fast, or too hard at corners. */
export const anyAxis = fc.record({
  current: pick(300, 2600),
  hold: pick(5, 100),
  speed: pick(50, 3000),
  acceleration: pick(300, 40_000),
  corner: pick(1, 400),
  mass: fc.double({ min: 0.1, max: 6, noNaN: true }),
  friction: fc.double({ min: 0, max: 25, noNaN: true }),
  incline: fc.constantFrom(0, 0, 30, 90),
  softening: fc.constantFrom(60, 80, 120),
  teeth: fc.constantFrom(16, 20, 36),
  inDecimals: fc.boolean(),
});
type AnyAxis = typeof anyAxis extends fc.Arbitrary<infer T> ? T : never;

export function textsOf(one: AnyAxis): Texts {
  const current = one.inDecimals
    ? { typed: one.current / 1000, unit: "A", basis: "rms" as const }
    : { typed: one.current, unit: "mA", factor: 1e-3, basis: "rms" as const };
  return {
    run_current: current,
    hold_current: { typed: one.hold, unit: "%" },
    microsteps: { typed: 16, unit: null },
    steps_per_mm: { typed: (200 * 16) / (2 * one.teeth), unit: "steps/mm" },
    max_speed: { typed: one.speed, unit: "mm/s", factor: 1e-3 },
    acceleration: { typed: one.acceleration, unit: "mm/s^2", factor: 1e-3 },
    corner_speed: { typed: one.corner, unit: "mm/s", factor: 1e-3 },
  };
}

function assemblyOf(axes: readonly AnyAxis[]): Assembly {
  return {
    ...exampleAssembly(),
    axes: axes.map((one, index) => {
      const axis = exampleAxis("xyz"[index]);
      axis.load = { ...axis.load, mass_kg: one.mass, friction_n: one.friction, incline_deg: one.incline };
      axis.mount = { softening_c: one.softening };
      axis.drive_train = { ...axis.drive_train!, teeth: one.teeth };
      axis.driver!.set_point!.sense_resistor_rating_w = 1;
      return axis;
    }),
  };
}

/** A machine of some axes with its text, and only the parameters that `keep` lets stand in it. */
export function caseOf(
  axes: readonly AnyAxis[],
  keep: (value: ParameterValue) => boolean = () => true,
): SolveInput {
  const assembly = assemblyOf(axes);
  const parameters = axes.flatMap((one, index) => {
    const axis = "xyz"[index] ?? "";
    return parametersOf(textsOf(one), assembly, axis)
      .map((value) => ({
        ...value,
        source: { ...value.source, start: value.source.start + 1000 * index },
      }))
      .filter(keep);
  });
  return { parameters, assembly, policy: DEFAULT_POLICY };
}
