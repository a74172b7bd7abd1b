import "server-only";
import type { DriftView } from "@/lib/schemas/machines-read";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { momentOf } from "./as-of";
import { machineCondition } from "./condition";
import { presentDrift } from "./present-drift";

interface Asked {
  readonly id: string;
  readonly asOf?: string | undefined;
}

/** Where a machine differs from its required configuration, now or at a moment in the past. */
export async function showDrift(context: Context, { id, asOf }: Asked): Promise<DriftView> {
  authorize(context, "machines.read");
  const moment = momentOf(context, asOf);
  return presentDrift(await machineCondition(id, moment), moment);
}
