import type { ParameterName } from "./parameters";

/** Whether a current is a peak or an rms value. A current without a basis is never used. */
export type Basis = "peak" | "rms";

/** Where a value stands in a text. */
export interface SourcePlace {
  readonly path: string;
  readonly line: number;
  readonly column: number;
  /** UTF-16 offsets of the value in its text, end exclusive. */
  readonly start: number;
  readonly end: number;
  /** The value as the text writes it. */
  readonly raw: string;
  /** Full key, sections included. */
  readonly key: string;
}

/** A parameter as read from a text. */
export interface ParameterValue {
  /** Axis name as the assembly spells it; null for a parameter of the machine. */
  readonly axis: string | null;
  readonly parameter: ParameterName;
  /** SI, except steps_per_mm (1/mm, or 1/deg on a rotary axis); booleans are 0 and 1. */
  readonly value: number;
  /** Unit of `value`: "A", "m/s", "rad/s", "1/mm", "" for counts ... ; "%" where a hold current is a share of the run current. */
  readonly unit: string;
  /** Only for currents; null means that nobody has said it yet. */
  readonly basis: Basis | null;
  /** Number and unit as typed or as the key table has them, e.g. 800 and "mA". */
  readonly typed: { readonly value: number; readonly unit: string | null };
  readonly source: SourcePlace;
}
