import type { Assembly } from "@/lib/domain/assembly";
import type { Diagnostic } from "@/lib/domain/diagnostic";
import type { Finding, LimitSense } from "@/lib/domain/findings";
import type { KeyTable } from "@/lib/domain/key-table";
import type { Level } from "@/lib/domain/levels";
import type { ParameterName } from "@/lib/domain/parameters";
import type { Policy } from "@/lib/domain/policy";
import type { Quantity, QuantityName } from "@/lib/domain/quantities";
import type { Layer } from "@/lib/domain/readings";
import type { Basis, ParameterValue } from "@/lib/domain/values";
import type { UnmappedKey } from "@/lib/keytable/types";
import type { Format } from "@/lib/parsers/types";
import type { CurrentProvenance } from "@/lib/rules/types";

/** One file of a configuration, decoded. */
export interface ConfigurationFile {
  readonly path: string;
  readonly text: string;
  /** Missing: recognised from the text. */
  readonly format?: Format | undefined;
}

export interface CheckInput {
  readonly files: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  readonly policy: Policy;
  /** Layer that the files were read from; rules of the key table that name another layer do not apply. */
  readonly layer?: Layer | undefined;
}

export interface DocumentReport {
  readonly path: string;
  readonly format: Format;
  readonly entries: number;
  readonly diagnostics: readonly Diagnostic[];
}

/** What a configuration says and what the checks make of it. The same object in a handler, a job and a worker. */
export interface CheckReport {
  readonly documents: readonly DocumentReport[];
  readonly parameters: readonly ParameterValue[];
  readonly unmapped: readonly UnmappedKey[];
  readonly quantities: readonly Quantity[];
  readonly findings: readonly Finding[];
  readonly provenance: readonly CurrentProvenance[];
}

/** A parameter whose meaning changed. Another unit or notation of the same value is no change. */
export interface ParameterChange {
  /** Revision letter A, B, C ... Z, AA ...; stands at the line, the parameter, its effects and its comments. */
  readonly letter: string;
  readonly axis: string | null;
  readonly parameter: ParameterName;
  readonly was: { value: number; unit: string; basis: Basis | null; line: number; path: string } | null;
  readonly toBe: { value: number; unit: string; basis: Basis | null; line: number; path: string } | null;
  /** (toBe − was)/|was|; null where either is missing or `was` is 0. */
  readonly change: number | null;
}

/** A physical quantity before and after. */
export interface Effect {
  readonly axis: string | null;
  readonly quantity: QuantityName;
  readonly label: string;
  readonly unit: string;
  readonly was: number | null;
  readonly toBe: number | null;
  readonly limit: number | null;
  readonly limitSense: LimitSense;
  readonly nearLimit: number | null;
  readonly levelWas: Level | null;
  readonly levelToBe: Level | null;
  /** The check that sets the limit; null for a quantity without one. */
  readonly ruleId: string | null;
  /** Letters of the parameter changes that move it. */
  readonly letters: readonly string[];
  /** Why there is no number, when there is none. */
  readonly missing: readonly string[];
}

/** How the findings of two evaluations compare. */
export interface FindingComparison {
  /** Graver than before, or not there before. */
  readonly fresh: readonly Finding[];
  /** Over, near or cannot before, and better now. */
  readonly cleared: readonly { readonly was: Finding; readonly toBe: Finding | null }[];
  /** Neither: the same level as before, though numbers may differ. Findings within limits are left out of it. */
  readonly unchanged: readonly Finding[];
}
