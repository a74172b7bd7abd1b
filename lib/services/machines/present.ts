import "server-only";
import type { MachineView } from "@/lib/schemas/machines-write";
import type { Machine } from "@/models/machines";

export function presentMachine(machine: Machine): MachineView {
  const { id, serial, modelId, siteId, state, stateReason, note, version } = machine;
  return { id, serial, modelId, siteId, state, stateReason, note, version };
}
