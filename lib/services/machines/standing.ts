import "server-only";
import type { Standing } from "@/lib/domain/floor";
import type { Level } from "@/lib/domain/levels";
import type { MachineState } from "@/lib/domain/machines";

/** What is kept of where a machine stands; null: it was never worked out. */
export interface KeptStatus {
  readonly level: Level | null;
  readonly read: boolean;
  readonly sentence: string;
}

export interface StandingWords {
  readonly standing: Standing;
  readonly level: Level | null;
  readonly sentence: string;
}

const NOT_YET = "not checked yet";

/** A machine out of service has no standing; one that is not read on something is never on baseline. */
export function standingOf(state: MachineState, status: KeptStatus | null | undefined): StandingWords {
  const level = status ? status.level : "cannot";
  const sentence = status?.sentence ?? NOT_YET;
  if (state !== "in_service") return { standing: "out_of_service", level, sentence };
  if (level !== null) return { standing: level, level, sentence };
  return { standing: status?.read ? "on_baseline" : "cannot", level, sentence };
}
