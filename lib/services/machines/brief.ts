import "server-only";
import { MachineModel, Site } from "@/models/catalog";
import { Machine } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";

export interface MachineBrief {
  readonly id: string;
  readonly serial: string;
  readonly modelId: string;
  readonly modelName: string;
  readonly siteName: string;
}

/** What a form needs of a machine that is chosen already. */
export async function machineBrief(context: Context, id: string): Promise<MachineBrief> {
  authorize(context, "machines.read");
  const machine = await Machine.findByPk(id, {
    include: [
      { model: MachineModel, as: "model", required: true },
      { model: Site, as: "site", required: true },
    ],
  });
  if (!machine) throw notFound("machine");
  const { serial, modelId, model, site } = machine;
  return { id, serial, modelId, modelName: model?.name ?? "", siteName: site?.name ?? "" };
}
