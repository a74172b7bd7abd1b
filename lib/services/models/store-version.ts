import "server-only";
import type { ModelHardware } from "@/lib/domain/catalog";
import type { MachineModel } from "@/models/catalog";
import { Axis, MachineModelVersion } from "@/models/catalog";
import type { Tx } from "@/lib/services/kernel/context";
import { personBehind } from "@/lib/services/kernel/context";

/** Stores the hardware as the version that the model's row names; versions before it stay readable. */
export async function storeModelVersion(tx: Tx, model: MachineModel, hardware: ModelHardware) {
  const within = { transaction: tx.transaction };
  const version = await MachineModelVersion.create(
    {
      modelId: model.id,
      version: model.version,
      supplyId: hardware.supply,
      controllerBoardId: hardware.controller_board,
      enclosureRiseK: hardware.enclosure_rise_k ?? null,
      hasReadBack: hardware.has_read_back,
      createdBy: personBehind(tx.actor),
      createdByName: tx.actor.name,
      createdAt: tx.now,
    },
    within,
  );
  const axes = hardware.axes.map((axis, position) => ({
    modelVersionId: version.id,
    position,
    axis: axis.axis,
    motorCount: axis.motor_count,
    motorId: axis.motor,
    driverId: axis.driver,
    driveTrainId: axis.drive_train,
    mountId: axis.mount,
    load: axis.load,
    travelMm: axis.travel_mm ?? null,
    travelDeg: axis.travel_deg ?? null,
    coupledWith: axis.coupled_with,
  }));
  await Axis.bulkCreate(axes, within);
}
