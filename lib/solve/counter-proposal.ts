import { ruleContext } from "@/lib/rules/view";
import { corrected } from "./corrections";
import { knobsOf, typedOf, type Knob } from "./knobs";
import { movesOf } from "./moves";
import { constraintsOf } from "./problem";
import { separate, solveAcross, solvePart, type Solved } from "./parts";
import { type Conflict, type CounterProposal, type SolveInput } from "./types";
import { overLimit } from "./verdicts";
import { withTyped } from "./with-values";

/** Typed numbers by place. */
type Typed = ReadonlyMap<string, number>;

const NOTHING: Typed = new Map();

/**
 * The smallest change of the text's numbers (sum of relative changes, each with its weight by the policy) after which
 * no check is over limit, and what no change in reach can clear. A value goes down to the policy's least share of its
 * present one at most; a current goes up to the ratings of motor and driver at most, and a run current only where less
 * speed or acceleration will not do, unless the policy says otherwise. Each value keeps to the steps that its text can
 * hold. Pure; the same input gives the same answer.
 */
export function counterProposal(input: SolveInput): CounterProposal {
  const before = overLimit(input, input.parameters);
  if (before.size === 0) return answered(input, { typed: NOTHING, conflicts: [] });
  const start = corrected(input);
  const found = solved(input, start);
  const typed = new Map([...start, ...found.typed]);
  const after = overLimit(input, withTyped(input.parameters, typed));
  const isSound = [...after.keys()].every((key) => before.has(key));
  return answered(input, { typed: isSound ? typed : NOTHING, conflicts: found.conflicts });
}

interface Answer {
  readonly typed: Typed;
  readonly conflicts: readonly Conflict[];
}

function answered(input: SolveInput, { typed, conflicts }: Answer): CounterProposal {
  const before = overLimit(input, input.parameters);
  const after = overLimit(input, withTyped(input.parameters, typed));
  return {
    ...movesOf(input, typed),
    cleared: [...before].flatMap(([key, check]) => (after.has(key) ? [] : [check])),
    conflicts,
    left: [...after.values()],
    leastShare: input.policy.counter_least_share,
  };
}

/** Part by part, then the checks of the whole machine. */
function solved(input: SolveInput, start: Typed): Answer {
  const { policy } = input;
  const parameters = withTyped(input.parameters, start);
  const context = ruleContext({ ...input, parameters });
  const knobs = currentsFirst(
    knobsOf({ context, parameters, policy, writable: input.writable ?? (() => true) }),
  );
  const constraints = constraintsOf(context, knobs);
  const ground = { context, policy };
  const { parts, across } = separate(knobs, constraints);
  const apart = together(parts.map((part) => solvePart(ground, part)));
  const { steps, conflicts } = solveAcross(ground, { knobs, constraints, across, apart });
  return { typed: new Map([...steps].flatMap(([knob, at]) => typedOf(knob, at))), conflicts };
}

/** Currents first: what they move is then computed once for many steps of the others. */
function currentsFirst(knobs: readonly Knob[]): Knob[] {
  const isCurrent = ({ kind }: Knob) => kind === "current";
  return [...knobs.filter(isCurrent), ...knobs.filter((knob) => !isCurrent(knob))];
}

function together(parts: readonly Solved[]): Solved {
  return {
    steps: new Map(parts.flatMap(({ steps }) => [...steps])),
    conflicts: parts.flatMap(({ conflicts }) => conflicts),
  };
}
