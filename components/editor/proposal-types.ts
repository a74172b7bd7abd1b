import type { Assembly } from "@/lib/domain/assembly";
import type { ChangeClass } from "@/lib/domain/change-states";
import type { ChangeKind, Effectivity } from "@/lib/domain/changes";
import type { KeyTable } from "@/lib/domain/key-table";
import type { Policy } from "@/lib/domain/policy";
import type { ConfigurationFile } from "@/lib/review/types";

/** What the editor starts from; lib/services/changes/start gives it. */
export interface ProposalStartData {
  readonly kind: ChangeKind;
  readonly model: { readonly id: string; readonly code: string; readonly name: string };
  readonly machine: { readonly id: string; readonly serial: string } | null;
  readonly baseLabel: string;
  readonly files: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  readonly policy: Policy;
  readonly ambientC: number | null;
  readonly sites: readonly { readonly id: string; readonly name: string; readonly machines: number }[];
  readonly machines: readonly { readonly id: string; readonly serial: string; readonly siteName: string }[];
}

/** A change that is being edited. */
export interface EditedChange {
  readonly id: string;
  readonly label: string;
  readonly lockVersion: number;
  readonly state: string;
  readonly fields: ProposalFields;
  readonly files: readonly { readonly path: string; readonly text: string }[];
}

/** What is said of a change beside its text. */
export interface ProposalFields {
  readonly title: string;
  readonly reason: string;
  readonly class: ChangeClass;
  readonly effectivity: Effectivity;
  /** Last day of a permitted deviation, "" while not chosen. */
  readonly deviationUntil: string;
  readonly note: string;
}

export const EMPTY_FIELDS: ProposalFields = {
  title: "",
  reason: "",
  class: "I",
  effectivity: { kind: "model" },
  deviationUntil: "",
  note: "",
};
