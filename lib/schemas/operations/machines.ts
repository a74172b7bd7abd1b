import { idParams } from "@/lib/schemas/common";
import { floorQuery, floorSchema } from "@/lib/schemas/floor";
import {
  asOfQuery,
  driftViewSchema,
  historyQuery,
  historySchema,
  machinePageSchema,
  machineQuery,
  machineSheetSchema,
  requiredTextQuery,
} from "@/lib/schemas/machines-read";
import { operation } from "@/lib/schemas/operation";

const TAG = "Machines";

export const machineOperations = {
  showFloor: operation({
    id: "showFloor",
    method: "GET",
    path: "/floor",
    action: "floor.read",
    summary: "Machines by parameters, by consequence: what is off its required configuration",
    tag: "Floor",
    query: floorQuery,
    answer: floorSchema,
  }),
  listMachines: operation({
    id: "listMachines",
    method: "GET",
    path: "/machines",
    action: "machines.read",
    summary: "Machines by serial number, with where they stand",
    tag: TAG,
    query: machineQuery,
    answer: machinePageSchema,
  }),
  showMachine: operation({
    id: "showMachine",
    method: "GET",
    path: "/machines/{id}",
    action: "machines.read",
    summary:
      "A machine: hardware with evidence, layers side by side, required configuration, drift, readings",
    tag: TAG,
    params: idParams,
    query: asOfQuery,
    answer: machineSheetSchema,
  }),
  showDrift: operation({
    id: "showDrift",
    method: "GET",
    path: "/machines/{id}/drift",
    action: "machines.read",
    summary: "Where a machine differs from its required configuration, by consequence",
    tag: TAG,
    params: idParams,
    query: asOfQuery,
    answer: driftViewSchema,
  }),
  requiredText: operation({
    id: "requiredText",
    method: "GET",
    path: "/machines/{id}/required-text",
    action: "machines.read",
    summary:
      "The exact text that a machine requires; for several files their list (application/json), and each one with ?file=",
    tag: TAG,
    params: idParams,
    query: requiredTextQuery,
    answer: { mediaType: "application/octet-stream" },
  }),
  parameterHistory: operation({
    id: "parameterHistory",
    method: "GET",
    path: "/machines/{id}/history",
    action: "machines.read",
    summary: "Every value that a parameter of a machine had, as read and as required",
    tag: TAG,
    params: idParams,
    query: historyQuery,
    answer: historySchema,
  }),
} as const;
