import type { Assembly } from "@/lib/domain/assembly";
import type { AxisKind } from "@/lib/domain/axis-kind";
import type { KeyTable } from "@/lib/domain/key-table";
import type { Policy } from "@/lib/domain/policy";
import type { ConfigurationFile } from "@/lib/review/types";

/** What the pictures and tools of one axis of a machine start from: what it is required to run, and its hardware. */
export interface AxisBasis {
  readonly machineId: string;
  readonly serial: string;
  /** As the assembly spells it. */
  readonly axis: string;
  readonly kind: AxisKind;
  /** The required configuration; empty where the machine has none yet. */
  readonly files: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  readonly policy: Policy;
}
