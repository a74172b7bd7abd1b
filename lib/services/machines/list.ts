import "server-only";
import type { MachinePage, MachineQuery, MachineRow } from "@/lib/schemas/machines-read";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { fleetRows, type FleetRow } from "./fleet-rows";
import { standingOf, type KeptStatus } from "./standing";

/** Machines by serial number. */
export async function listMachines(context: Context, query: MachineQuery): Promise<MachinePage> {
  authorize(context, "machines.read");
  const { rows, total } = await fleetRows({ ...query, order: "serial" });
  return { items: rows.map(presentMachine), page: query.page, pageSize: query.pageSize, total };
}

export function keptStatus({ read, level, sentence }: FleetRow): KeptStatus | null {
  return read === null ? null : { read, level, sentence: sentence ?? "" };
}

function presentMachine(row: FleetRow): MachineRow {
  return {
    id: row.id,
    serial: row.serial,
    model: { id: row.modelId, code: row.modelCode, name: row.modelName },
    site: { id: row.siteId, code: row.siteCode, name: row.siteName },
    state: row.state,
    ...standingOf(row.state, keptStatus(row)),
    lastReadAt: row.lastReadAt?.toISOString() ?? null,
    stale: row.stale ?? false,
    version: row.version,
  };
}
