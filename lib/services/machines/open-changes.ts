import "server-only";
import { Op } from "sequelize";
import type { ChangeState } from "@/lib/domain/change-states";
import { changeLabel } from "@/lib/domain/changes";
import type { OpenChange } from "@/lib/schemas/machines-read";
import { ChangeRequest } from "@/models/changes";
import type { Machine } from "@/models/machines";

const OPEN: readonly ChangeState[] = ["draft", "evaluation", "deferred", "approved", "implementation"];

/** Changes that are not at their end and whose effectivity takes this machine in. */
export async function openChanges(machine: Machine): Promise<OpenChange[]> {
  const changes = await ChangeRequest.findAll({
    where: {
      modelId: machine.modelId,
      state: [...OPEN],
      [Op.or]: [{ machineId: null }, { machineId: machine.id }],
    },
    order: [["number", "DESC"]],
  });
  return changes.filter((change) => takesIn(change, machine)).map(presentChange);
}

function takesIn({ machineId, effectivity }: ChangeRequest, machine: Machine): boolean {
  if (machineId !== null) return machineId === machine.id;
  if (effectivity.kind === "model") return true;
  if (effectivity.kind === "sites") return effectivity.siteIds.includes(machine.siteId);
  return effectivity.machineIds.includes(machine.id);
}

function presentChange(change: ChangeRequest): OpenChange {
  const { id, title, state, authorName } = change;
  return {
    id,
    label: changeLabel(change.number),
    title,
    class: change.class,
    state,
    authorName,
    updatedAt: change.updatedAt.toISOString(),
  };
}
