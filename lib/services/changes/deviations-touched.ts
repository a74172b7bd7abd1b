import "server-only";
import { changeLabel } from "@/lib/domain/changes";
import { columnKey } from "@/lib/domain/floor";
import type { ParameterChange } from "@/lib/review/types";
import type { ChangeViewData } from "@/lib/schemas/changes";
import { ChangeRequest } from "@/models/changes";
import { deviationsInForce } from "@/lib/services/machines/required";
import { machinesOf } from "./effectivity";

/** Permitted deviations in force on machines of the effectivity that hold a parameter which the change moves. */
export async function deviationsTouched(
  change: ChangeRequest,
  moved: readonly ParameterChange[],
  asOf: Date,
): Promise<ChangeViewData["deviationsTouched"]> {
  const machines = await machinesOf({ modelId: change.modelId, effectivity: change.effectivity });
  const inForce = await deviationsInForce(
    machines.map(({ id }) => id),
    asOf,
  );
  const others = inForce.filter(({ changeId }) => changeId !== change.id);
  const origins = await ChangeRequest.findAll({
    where: { id: others.flatMap(({ changeId }) => changeId ?? []) },
  });
  const labels = new Map(origins.map(({ id, number }) => [id, changeLabel(number)]));
  const serials = new Map(machines.map(({ id, serial }) => [id, serial]));
  const keys = new Set(moved.map(({ axis, parameter }) => columnKey(axis, parameter)));
  return others.flatMap(({ machineId, changeId, edits, untilOn }) =>
    edits
      .filter(({ axis, parameter }) => keys.has(columnKey(axis, parameter)))
      .map(({ axis, parameter }) => ({
        machineId,
        serial: serials.get(machineId) ?? "",
        changeLabel: labels.get(changeId ?? "") ?? "",
        axis,
        parameter,
        until: untilOn,
      })),
  );
}
