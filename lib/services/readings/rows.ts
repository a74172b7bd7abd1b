import "server-only";
import type { Transaction } from "sequelize";
import { Op } from "sequelize";
import type { ReadingRow } from "@/lib/schemas/readings";
import { MachineModel, Site } from "@/models/catalog";
import { Machine } from "@/models/machines";
import { Evaluation, RevisionFile, type Reading } from "@/models/revisions";

/** A reading beside its machine, model and site. */
export interface ReadingWithMachine {
  readonly reading: Reading;
  readonly machine: Machine;
}

/** What the checks made of some readings when each was kept; the newest evaluation that is not younger than it. */
export async function evaluationsWhenKept(
  readings: readonly Reading[],
  transaction?: Transaction,
): Promise<Map<string, Evaluation>> {
  const rows = await Evaluation.findAll({
    where: {
      revisionId: [...new Set(readings.map(({ revisionId }) => revisionId))],
      machineId: { [Op.ne]: null },
    },
    attributes: ["id", "revisionId", "machineId", "level", "rulesVersion", "policyVersion", "createdAt"],
    order: [["createdAt", "DESC"]],
    transaction: transaction ?? null,
  });
  return new Map(
    readings.flatMap((reading) => {
      const own = rows.find(
        (row) =>
          row.revisionId === reading.revisionId &&
          row.machineId === reading.machineId &&
          row.createdAt.getTime() <= reading.receivedAt.getTime(),
      );
      return own ? [[reading.id, own] as const] : [];
    }),
  );
}

async function pathsOf(readings: readonly Reading[]): Promise<Map<string, string[]>> {
  const rows = await RevisionFile.findAll({
    where: { revisionId: [...new Set(readings.map(({ revisionId }) => revisionId))] },
    attributes: ["revisionId", "position", "path"],
    order: [["position", "ASC"]],
  });
  const paths = new Map<string, string[]>();
  for (const { revisionId, path } of rows) paths.set(revisionId, [...(paths.get(revisionId) ?? []), path]);
  return paths;
}

/** Readings as lists show them; three queries however many. */
export async function readingRows(readings: readonly Reading[]): Promise<ReadingRow[]> {
  const machines = await Machine.findAll({
    where: { id: [...new Set(readings.map(({ machineId }) => machineId))] },
    include: [
      { model: MachineModel, as: "model", required: true },
      { model: Site, as: "site", required: true },
    ],
  });
  const byId = new Map(machines.map((machine) => [machine.id, machine]));
  const evaluations = await evaluationsWhenKept(readings);
  const paths = await pathsOf(readings);
  return readings.flatMap((reading) => {
    const machine = byId.get(reading.machineId);
    const files = paths.get(reading.revisionId) ?? [];
    const level = evaluations.get(reading.id)?.level ?? null;
    return machine ? [presentReading({ reading, machine }, files, level)] : [];
  });
}

export function presentReading(
  { reading, machine }: ReadingWithMachine,
  files: string[],
  level: ReadingRow["level"],
): ReadingRow {
  return {
    id: reading.id,
    machine: { id: machine.id, serial: machine.serial },
    model: { id: machine.modelId, name: machine.model?.name ?? "" },
    site: { id: machine.siteId, name: machine.site?.name ?? "" },
    kind: reading.kind,
    layer: reading.layer,
    readAt: reading.readAt.toISOString(),
    receivedAt: reading.receivedAt.toISOString(),
    firmwareVersion: reading.firmwareVersion,
    actorName: reading.actorName,
    note: reading.note,
    files,
    level,
  };
}
