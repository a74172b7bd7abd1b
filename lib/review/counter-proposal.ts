import type { ParameterName } from "@/lib/domain/parameters";
import type { Basis, ParameterValue } from "@/lib/domain/values";
import type { ParameterEdit } from "@/lib/keytable/types";
import { writeParameters } from "@/lib/keytable/write-parameters";
import { counterProposal } from "@/lib/solve/counter-proposal";
import {
  placeKey,
  type CheckPlace,
  type Conflict,
  type CounterMove,
  type CounterProposal,
} from "@/lib/solve/types";
import { overLimit } from "@/lib/solve/verdicts";
import { axisShapes } from "./axis-shapes";
import { parameterKey } from "./axis-word";
import { mapFiles, parseFile } from "./check";
import type { CheckInput, ConfigurationFile } from "./types";

interface Side {
  readonly value: number;
  readonly unit: string;
  readonly basis: Basis | null;
}

/** One value of the text that a counter-proposal changes. */
export interface CounterRow {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  /** What else the same key sets. */
  readonly also: readonly { readonly axis: string | null; readonly parameter: ParameterName }[];
  /** In the inside unit, as in `ParameterChange`. */
  readonly was: Side;
  readonly toBe: Side;
  readonly change: number | null;
  readonly cost: number;
  readonly because: readonly CheckPlace[];
  readonly path: string;
  readonly line: number;
}

/** A counter-proposal as an edit of the texts. */
export interface CounterEdit {
  readonly moves: readonly CounterRow[];
  /** Sum over the moves of weight × relative change. */
  readonly cost: number;
  readonly cleared: readonly CheckPlace[];
  readonly conflicts: readonly Conflict[];
  readonly left: readonly CheckPlace[];
  readonly leastShare: number;
  /** The texts with the moves written into them; everything else stays byte for byte. */
  readonly files: readonly ConfigurationFile[];
}

/**
 * The smallest change of a configuration's values that clears every finding over limit, written into its texts, or
 * what stands against it. Pure; takes from some milliseconds to some seconds: call it off the thread that types.
 */
export function counterEdit(input: CheckInput): CounterEdit {
  const documents = input.files.map(parseFile);
  const { keyTable, assembly, policy, layer } = input;
  const { parameters } = mapFiles(documents, input);
  const places = { documents, keyTable, axes: axisShapes(assembly), layer };
  const stuck = new Set(
    writeParameters({ ...places, edits: parameters.map(asItStands) }).refused.map(parameterKey),
  );
  const writable = (value: ParameterValue) => !stuck.has(parameterKey(value));
  const proposal = counterProposal({ parameters, assembly, policy, writable });
  const { texts, refused } = writeParameters({ ...places, edits: proposal.moves.flatMap(editsOf) });
  const files = input.files.map((file, index) => ({ ...file, text: texts[index] ?? file.text }));
  const after = mapFiles(files.map(parseFile), input).parameters;
  const open = new Set(proposal.left.map(placeKey));
  const holds =
    refused.length === 0 &&
    [...overLimit({ assembly, policy, parameters: after }, after).keys()].every((key) => open.has(key));
  return holds ? answer(proposal, { files, before: parameters, after }) : nothing(input, parameters);
}

function asItStands({ axis, parameter, typed, basis }: ParameterValue): ParameterEdit {
  return { axis, parameter, value: typed.value, unit: typed.unit ?? "", ...(basis ? { basis } : {}) };
}

function editsOf({ axis, parameter, also, toBe, unit, basis }: CounterMove): ParameterEdit[] {
  const shared = { value: toBe, unit: unit ?? "", ...(basis ? { basis } : {}) };
  return [{ axis, parameter }, ...also].map((place) => ({ ...place, ...shared }));
}

interface Written {
  readonly files: readonly ConfigurationFile[];
  readonly before: readonly ParameterValue[];
  readonly after: readonly ParameterValue[];
}

function answer(proposal: CounterProposal, { files, before, after }: Written): CounterEdit {
  const { cost, cleared, conflicts, left, leastShare } = proposal;
  const sideOf = (values: readonly ParameterValue[], move: CounterMove): Side | undefined =>
    values.find((value) => parameterKey(value) === parameterKey(move));
  const moves = proposal.moves.flatMap((move) => {
    const [was, toBe] = [sideOf(before, move), sideOf(after, move)];
    if (!was || !toBe) return [];
    const { axis, parameter, also, change, because, source } = move;
    const place = { path: source.path, line: source.line };
    return [
      { axis, parameter, also, was: side(was), toBe: side(toBe), change, cost: move.cost, because, ...place },
    ];
  });
  return { moves, cost, cleared, conflicts, left, leastShare, files };
}

/** Twelve digits hold whatever a text says, and keep the last bits of 825 mA · 0.001 A/mA out. */
function side({ value, unit, basis }: Side): Side {
  return { value: Number(value.toPrecision(12)), unit, basis };
}

/** No change, where the text would not say what the search found. */
function nothing(
  { files, assembly, policy }: CheckInput,
  parameters: readonly ParameterValue[],
): CounterEdit {
  const left = [...overLimit({ assembly, policy, parameters }, parameters).values()];
  const leastShare = policy.counter_least_share;
  return { moves: [], cost: 0, cleared: [], conflicts: [], left, leastShare, files };
}
