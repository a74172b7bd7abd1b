import "server-only";
import type { Transaction } from "sequelize";
import { Op } from "sequelize";
import { Baseline, ChangeRequest, MachineBaseline } from "@/models/changes";
import type { Tx } from "@/lib/services/kernel/context";

/** The newest approved baseline of a model that stands; proposals are made against it. */
export function currentBaseline(modelId: string, transaction?: Transaction): Promise<Baseline | null> {
  return Baseline.findOne({
    where: { modelId, voidedAt: null },
    order: [["number", "DESC"]],
    transaction: transaction ?? null,
  });
}

/** The newest baseline of a model that has reached machines: what a machine that joins the fleet is to run. */
async function releasedBaseline(modelId: string, transaction: Transaction): Promise<Baseline | null> {
  const standing = await Baseline.findAll({
    where: { modelId, voidedAt: null },
    order: [["number", "DESC"]],
    transaction,
  });
  const changes = await ChangeRequest.findAll({
    where: { id: standing.flatMap(({ changeId }) => changeId ?? []) },
    attributes: ["id", "state", "effectivity"],
    transaction,
  });
  const reached = new Set(
    changes
      .filter(
        ({ state, effectivity }) =>
          ["implementation", "verified"].includes(state) && effectivity.kind === "model",
      )
      .map(({ id }) => id),
  );
  return standing.find(({ changeId }) => changeId === null || reached.has(changeId)) ?? null;
}

/** The slot in force for a machine at a time: which baseline it requires. */
export function baselineSlot(
  machineId: string,
  asOf: Date,
  transaction?: Transaction,
): Promise<MachineBaseline | null> {
  return MachineBaseline.findOne({
    where: {
      machineId,
      fromAt: { [Op.lte]: asOf },
      untilAt: { [Op.or]: [{ [Op.is]: null }, { [Op.gt]: asOf }] },
    },
    include: [{ model: Baseline, as: "baseline", required: true }],
    order: [["fromAt", "DESC"]],
    transaction: transaction ?? null,
  });
}

interface Assignment {
  readonly machineId: string;
  readonly baselineId: string;
  readonly changeId: string | null;
}

/** From now on this machine requires that baseline; the slot before it ends. One slot is open at a time. */
export async function assignBaseline(tx: Tx, { machineId, baselineId, changeId }: Assignment): Promise<void> {
  await MachineBaseline.update(
    { untilAt: tx.now },
    { where: { machineId, untilAt: null }, transaction: tx.transaction },
  );
  await MachineBaseline.create(
    { machineId, baselineId, changeId, fromAt: tx.now },
    { transaction: tx.transaction },
  );
}

/** For a machine that joins the fleet or changes its model. Nothing where the model has no released baseline yet. */
export async function assignReleasedBaseline(
  tx: Tx,
  machine: { id: string; modelId: string },
): Promise<void> {
  const baseline = await releasedBaseline(machine.modelId, tx.transaction);
  if (baseline)
    await assignBaseline(tx, { machineId: machine.id, baselineId: baseline.id, changeId: baseline.changeId });
}
