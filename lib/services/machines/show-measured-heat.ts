import "server-only";
import type { HeatReport } from "@/lib/review/measured-heat";
import { Machine } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { machineHeat } from "./measured-heat";

export async function showMeasuredHeat(
  context: Context,
  { id }: { readonly id: string },
): Promise<HeatReport> {
  authorize(context, "machines.read");
  if ((await Machine.count({ where: { id } })) === 0) throw notFound("machine");
  return machineHeat(id);
}
