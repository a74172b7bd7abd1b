import "server-only";
import type { MachineView } from "@/lib/schemas/machines-write";
import { MachineModel, Site } from "@/models/catalog";
import { Machine } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { modelHardware } from "./assembly";
import { presentMachine } from "./present";

export interface MachineToEdit {
  readonly machine: MachineView;
  readonly model: { readonly id: string; readonly code: string; readonly name: string };
  readonly siteName: string;
  readonly axes: readonly string[];
}

/** A machine as somebody needs it who changes its facts. */
export async function machineToEdit(context: Context, id: string): Promise<MachineToEdit> {
  authorize(context, "machines.hardware");
  const machine = await Machine.findByPk(id, {
    include: [
      { model: MachineModel, as: "model" },
      { model: Site, as: "site" },
    ],
  });
  if (!machine?.model || !machine.site) throw notFound("machine");
  const { code, name } = machine.model;
  const { axes } = await modelHardware(machine.modelId);
  return {
    machine: presentMachine(machine),
    model: { id: machine.modelId, code, name },
    siteName: machine.site.name,
    axes: axes.map(({ axis }) => axis),
  };
}
