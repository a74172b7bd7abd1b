import type { AxisKind } from "@/lib/domain/axis-kind";
import type { Diagnostic } from "@/lib/domain/diagnostic";
import type { ParameterName } from "@/lib/domain/parameters";
import type { Basis, ParameterValue } from "@/lib/domain/values";

/** What the key table needs to know of an axis: its name and order, and what step- and turn-based units rest on. */
export interface AxisShape {
  readonly axis: string;
  readonly kind: AxisKind;
  /** Metres (linear) or radians (rotary) of the axis for one motor turn; undefined where the drive train is not known. */
  readonly travelPerTurn?: number | undefined;
  /** 1/mm or 1/deg from the geometry, when the text has no scale of its own and microsteps are known. */
  readonly fullStepsPerTurn?: number | undefined;
}

export interface Suggestion {
  readonly parameter: ParameterName;
  readonly axis: string | null;
  readonly unit: string | null;
  readonly basis: Basis | null;
  /** 0 to 1. */
  readonly score: number;
  readonly reason: string;
}

export interface UnmappedKey {
  readonly path: string;
  readonly line: number;
  readonly key: string;
  readonly raw: string;
  readonly suggestions: readonly Suggestion[];
}

/** What a key table reads out of the documents of one configuration. */
export interface Mapping {
  readonly parameters: readonly ParameterValue[];
  readonly unmapped: readonly UnmappedKey[];
  /** By document, in the order given. */
  readonly diagnostics: readonly (readonly Diagnostic[])[];
}

/** A wanted value for one parameter, in any unit of its dimension; converted to the text's own unit and basis when written. */
export interface ParameterEdit {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  readonly value: number;
  readonly unit: string;
  readonly basis?: Basis | undefined;
}

export interface WriteResult {
  /** Texts in the order of the documents; unchanged ones are the same string. */
  readonly texts: readonly string[];
  readonly applied: readonly {
    axis: string | null;
    parameter: ParameterName;
    path: string;
    line: number;
    alsoAxes: readonly string[];
  }[];
  readonly refused: readonly { axis: string | null; parameter: ParameterName; reason: string }[];
}
