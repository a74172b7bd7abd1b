import "server-only";
import { Op } from "sequelize";
import { changeLabel } from "@/lib/domain/changes";
import { MachineModel, Site } from "@/models/catalog";
import { ChangeRequest } from "@/models/changes";
import { LotMachine } from "@/models/implementation";
import { Machine } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { machineAssembly } from "@/lib/services/machines/assembly";
import { proofOf } from "./proof";

/** One change to be put onto one machine. */
export interface Step {
  readonly changeId: string;
  readonly changeLabel: string;
  readonly title: string;
  readonly machineId: string;
  readonly serial: string;
  readonly modelName: string;
  readonly siteName: string;
  readonly releasedAt: string;
  readonly downloadedAt: string | null;
  readonly appliedAt: string | null;
  readonly verifiedAt: string | null;
  /** What is still missing, in a sentence; null once verified. */
  readonly missing: string | null;
}

export interface StepDetail extends Step {
  readonly axes: readonly string[];
  readonly hasReadBack: boolean;
}

const MOST = 200;

/** Steps that wait, the oldest release first. */
export async function listSteps(
  context: Context,
  { siteId, q }: { siteId?: string | undefined; q?: string | undefined },
): Promise<Step[]> {
  authorize(context, "changes.read");
  const pattern = `%${(q ?? "").replaceAll(/[\\%_]/g, String.raw`\$&`)}%`;
  const machines = await Machine.findAll({
    where: { ...(siteId ? { siteId } : {}), ...(q ? { serial: { [Op.iLike]: pattern } } : {}) },
    attributes: ["id"],
  });
  const places = await LotMachine.findAll({
    where: { machineId: machines.map(({ id }) => id), verifiedAt: null, endedAt: null },
    order: [["releasedAt", "ASC"]],
    limit: MOST,
  });
  return stepViews(places, context.now);
}

export async function showStep(context: Context, changeId: string, machineId: string): Promise<StepDetail> {
  authorize(context, "changes.read");
  const place = await LotMachine.findOne({ where: { changeId, machineId } });
  const [step] = place ? await stepViews([place], context.now) : [];
  if (!step) throw notFound("implementation step");
  const { assembly, hasReadBack } = await machineAssembly(machineId);
  return { ...step, axes: assembly.axes.map(({ axis }) => axis), hasReadBack };
}

async function stepViews(places: readonly LotMachine[], now: Date): Promise<Step[]> {
  const changes = await ChangeRequest.findAll({ where: { id: places.map(({ changeId }) => changeId) } });
  const machines = await Machine.findAll({
    where: { id: places.map(({ machineId }) => machineId) },
    include: [
      { model: MachineModel, as: "model" },
      { model: Site, as: "site" },
    ],
  });
  const changeById = new Map(changes.map((change) => [change.id, change]));
  const machineById = new Map(machines.map((machine) => [machine.id, machine]));
  const views = places.map(async (place) => {
    const closed = place.verifiedAt !== null || place.endedAt !== null;
    const missing = closed ? null : (await proofOf(place, now)).missing;
    return stepView(place, {
      change: changeById.get(place.changeId),
      machine: machineById.get(place.machineId),
      missing,
    });
  });
  return Promise.all(views);
}

interface Facts {
  readonly change: ChangeRequest | undefined;
  readonly machine: Machine | undefined;
  readonly missing: string | null;
}

function stepView(place: LotMachine, { change, machine, missing }: Facts): Step {
  return {
    changeId: place.changeId,
    changeLabel: changeLabel(change?.number ?? 0),
    title: change?.title ?? "",
    machineId: place.machineId,
    serial: machine?.serial ?? "",
    modelName: machine?.model?.name ?? "",
    siteName: machine?.site?.name ?? "",
    releasedAt: place.releasedAt.toISOString(),
    downloadedAt: place.downloadedAt?.toISOString() ?? null,
    appliedAt: place.appliedAt?.toISOString() ?? null,
    verifiedAt: place.verifiedAt?.toISOString() ?? null,
    missing,
  };
}
