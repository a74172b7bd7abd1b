import "server-only";
import type { WhereOptions } from "sequelize";
import { Op } from "sequelize";
import type { z } from "zod";
import { changeLabel } from "@/lib/domain/changes";
import type { ChangeRow, changeListQuery } from "@/lib/schemas/changes";
import { MachineModel } from "@/models/catalog";
import { Baseline, ChangeRequest, ProposalVersion } from "@/models/changes";
import { Machine } from "@/models/machines";
import { Evaluation } from "@/models/revisions";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";

type Query = z.output<typeof changeListQuery>;

export interface ChangePage {
  readonly items: readonly ChangeRow[];
  readonly page: number;
  readonly pageSize: number;
  readonly total: number;
}

/** Change requests, those that moved last first. */
export async function listChanges(context: Context, query: Query): Promise<ChangePage> {
  authorize(context, "changes.read");
  const { page, pageSize } = query;
  const { rows, count } = await ChangeRequest.findAndCountAll({
    where: whereOf(query),
    order: [["updatedAt", "DESC"]],
    offset: (page - 1) * pageSize,
    limit: pageSize,
  });
  const facts = await factsOf(rows);
  return { items: rows.map((row) => rowView(row, facts)), page, pageSize, total: count };
}

function whereOf({ state, modelId, machineId, q }: Query): WhereOptions<ChangeRequest> {
  const number = /^(?:cr-)?0*(\d{1,9})$/i.exec(q ?? "")?.[1];
  const words = { title: { [Op.iLike]: `%${(q ?? "").replaceAll(/[\\%_]/g, String.raw`\$&`)}%` } };
  return {
    ...(state ? { state } : {}),
    ...(modelId ? { modelId } : {}),
    ...(machineId ? { machineId } : {}),
    ...(q ? { [Op.or]: number ? [{ number: Number(number) }, words] : [words] } : {}),
  };
}

interface Facts {
  readonly models: ReadonlyMap<string, MachineModel>;
  readonly serials: ReadonlyMap<string, string>;
  readonly versions: ReadonlyMap<string, ProposalVersion>;
  readonly levels: ReadonlyMap<string, Evaluation["level"]>;
  readonly baselines: ReadonlyMap<string, string>;
}

async function factsOf(rows: readonly ChangeRequest[]): Promise<Facts> {
  const modelIds = [...new Set(rows.map(({ modelId }) => modelId))];
  const models = await MachineModel.findAll({ where: { id: modelIds } });
  const machines = await Machine.findAll({ where: { id: rows.flatMap(({ machineId }) => machineId ?? []) } });
  const current = rows.map(({ id, currentVersion }) => ({ changeId: id, version: currentVersion }));
  const versions = current.length === 0 ? [] : await ProposalVersion.findAll({ where: { [Op.or]: current } });
  const evaluations = await Evaluation.findAll({
    where: { id: versions.map(({ evaluationId }) => evaluationId) },
    attributes: ["id", "level"],
  });
  const baselines = await Baseline.findAll({
    where: { modelId: modelIds, voidedAt: null },
    order: [["number", "ASC"]],
    attributes: ["id", "modelId"],
  });
  return {
    models: new Map(models.map((model) => [model.id, model])),
    serials: new Map(machines.map(({ id, serial }) => [id, serial])),
    versions: new Map(versions.map((version) => [version.changeId, version])),
    levels: new Map(evaluations.map(({ id, level }) => [id, level])),
    baselines: new Map(baselines.map(({ id, modelId }) => [modelId, id])),
  };
}

const OPEN = ["draft", "evaluation", "deferred"] as const;

function rowView(change: ChangeRequest, facts: Facts): ChangeRow {
  const model = facts.models.get(change.modelId);
  const version = facts.versions.get(change.id);
  const open = OPEN.some((state) => state === change.state);
  const today = facts.baselines.get(change.modelId) ?? null;
  return {
    id: change.id,
    label: changeLabel(change.number),
    title: change.title,
    kind: change.kind,
    class: change.class,
    state: change.state,
    model: { id: change.modelId, name: model?.name ?? "" },
    machine: change.machineId
      ? { id: change.machineId, serial: facts.serials.get(change.machineId) ?? "" }
      : null,
    authorName: change.authorName,
    level: facts.levels.get(version?.evaluationId ?? "") ?? "cannot",
    stale: open && change.kind === "baseline" && (version?.baseBaselineId ?? null) !== today,
    submittedAt: change.submittedAt?.toISOString() ?? null,
    updatedAt: change.updatedAt.toISOString(),
  };
}
