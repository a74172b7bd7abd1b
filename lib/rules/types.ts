import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import type { AxisKind } from "@/lib/domain/axis-kind";
import type { Finding } from "@/lib/domain/findings";
import type { ParameterName } from "@/lib/domain/parameters";
import type { Policy } from "@/lib/domain/policy";
import type { Quantity, QuantityName } from "@/lib/domain/quantities";
import type { ParameterValue } from "@/lib/domain/values";
import type { Judged } from "./assessment";

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

/** Why a number cannot be had: the paths of what is missing for it. */
export interface Missing {
  readonly ok: false;
  readonly needs: readonly string[];
  /** A sentence where more than absence is the matter; empty otherwise. */
  readonly reason: string;
  /** Those of `needs` that the text has, but that cannot be used as they stand; `reason` speaks of them. */
  readonly refused?: readonly string[];
  /** The heat grows faster than it leaves: there is no steady state. */
  readonly runaway?: boolean;
}

/** A number with the paths of the defaults that it rests on. */
export interface Known {
  readonly ok: true;
  readonly value: number;
  readonly assumed: readonly string[];
}

export type Datum = Known | Missing;

/** A computed quantity. The formula is put into words only where somebody reads it. */
export type Computed = (Known & { readonly formula: () => string }) | Missing;

/** What a rule sees of one axis. */
export interface AxisView {
  /** As the assembly spells it. */
  readonly axis: string;
  readonly kind: AxisKind;
  readonly hardware: AxisAssembly;
  readonly assembly: Assembly;
  readonly policy: Policy;
  /** A parameter of this axis, or of the machine. */
  readonly parameter: (name: ParameterName) => ParameterValue | undefined;
  readonly quantity: (name: QuantityName) => Computed;
  /** The same axis with another value of one parameter that its text has. */
  readonly withValue: (name: ParameterName, value: number) => AxisView;
}

export interface RuleContext {
  readonly input: RuleInput;
  readonly axes: readonly AxisView[];
  /** A quantity of the whole machine. */
  readonly quantity: (name: QuantityName) => Computed;
  /** The same machine with another value of one parameter of one axis. */
  readonly withValue: (axis: string, name: ParameterName, value: number) => RuleContext;
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
  /**
   * Hardware fields and parameters it can use: "motor.inductance_mh", "driver.set_point.gain", "supply.voltage_v",
   * "load.mass_kg", "axis.travel_mm", "machine.ambient_c"; a parameter of the text without a dot: "acceleration".
   */
  readonly needs: readonly string[];
  /** Near and over limits in words, with the default numbers. */
  readonly margin: string;
  readonly caution: string | null;
  readonly evaluate: (context: RuleContext) => Finding[];
  /** The bare verdicts of the same check, for what asks thousands of times: no words, no clearing value. */
  readonly judge: (context: RuleContext) => RuleVerdict[];
}

/** What a check makes of one axis; null for the machine as a whole. */
export interface RuleVerdict {
  readonly axis: string | null;
  readonly assessment: Judged | Missing;
}
