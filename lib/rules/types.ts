import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import type { AxisKind } from "@/lib/domain/axis-kind";
import type { Finding } from "@/lib/domain/findings";
import type { ParameterName } from "@/lib/domain/parameters";
import type { Policy } from "@/lib/domain/policy";
import type { Quantity, QuantityName } from "@/lib/domain/quantities";
import type { ParameterValue } from "@/lib/domain/values";

export interface RuleInput {
  readonly parameters: readonly ParameterValue[];
  readonly assembly: Assembly;
  readonly policy: Policy;
}

export interface RuleResult {
  readonly quantities: readonly Quantity[];
  readonly findings: readonly Finding[];
  readonly provenance: readonly CurrentProvenance[];
}

/** One step from the number typed to the current in the winding. */
export interface ProvenanceStep {
  readonly label: string;
  /** "800 mA", "peak", "0.64 V", "÷ (8 · 0.11 Ω)" ... */
  readonly text: string;
  /** Where the step comes from: the text's line, the key table, the catalog, the machine's own hardware, or nobody. */
  readonly from: string;
}

export interface CurrentProvenance {
  readonly axis: string;
  readonly parameter: "run_current" | "hold_current";
  readonly steps: readonly ProvenanceStep[];
  /** A rms in one winding; null where it cannot be known, `missing` says why. */
  readonly rms: number | null;
  /** Share of 1, from resistor, reference and typing; null where unknown. */
  readonly tolerance: number | null;
  readonly missing: readonly string[];
}

/** What a rule sees of one axis. */
export interface AxisView {
  readonly axis: string;
  readonly kind: AxisKind;
  readonly hardware: AxisAssembly;
  readonly parameter: (name: ParameterName) => ParameterValue | undefined;
  readonly quantity: (name: QuantityName) => Computed;
}

/** A computed quantity, or the paths of what is missing for it. */
export type Computed =
  | {
      readonly ok: true;
      readonly value: number;
      readonly formula: string;
      readonly assumed: readonly string[];
    }
  | { readonly ok: false; readonly needs: readonly string[]; readonly reason: string };

export interface RuleContext {
  readonly input: RuleInput;
  readonly axes: readonly AxisView[];
  readonly machine: {
    readonly parameter: (name: ParameterName) => ParameterValue | undefined;
    readonly quantity: (name: QuantityName) => Computed;
  };
}

/** A row of the table of checks. */
export interface Rule {
  readonly id: string;
  readonly title: string;
  /** What is compared with what, in one sentence, for the page Checks. */
  readonly compares: string;
  /** The formula in symbols, for the page Checks. */
  readonly formula: string;
  readonly source: string;
  /** Hardware fields and parameters it can use, e.g. "motor.inductance_mh", "supply.voltage_v", "acceleration". */
  readonly needs: readonly string[];
  /** Near and over limits in words, with the default numbers. */
  readonly margin: string;
  readonly caution: string | null;
  readonly evaluate: (context: RuleContext) => Finding[];
}
