import "server-only";
import { changeLabel } from "@/lib/domain/changes";
import type { ParameterName } from "@/lib/domain/parameters";
import type { Layer } from "@/lib/domain/readings";
import type { ParameterValue } from "@/lib/domain/values";
import { parameterKey } from "@/lib/review/axis-word";
import { mapFiles, parseFile } from "@/lib/review/check";
import type { History, HistoryEntry, HistoryQuery } from "@/lib/schemas/machines-read";
import { Baseline, ChangeRequest, MachineBaseline } from "@/models/changes";
import { Deviation } from "@/models/implementation";
import { Machine } from "@/models/machines";
import { Reading } from "@/models/revisions";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import type { StoredFile } from "@/lib/services/revisions/files";
import { loadFilesOf } from "@/lib/services/revisions/load";
import { machineAssembly } from "./assembly";
import { presentValue } from "./present-drift";

/** The newest readings that a history looks through; they share their texts where nothing changed. */
const READINGS_LOOKED_THROUGH = 300;

interface Asked extends HistoryQuery {
  readonly id: string;
}

/** Reads one parameter out of texts as today's key table has it, whatever was known of their keys when they were kept. */
interface Reader {
  readonly valueIn: (revisionId: string, layer: Layer | undefined) => ParameterValue | null;
}

/** Every value that one parameter of a machine had: as read, as required by its baselines, as permitted. */
export async function parameterHistory(context: Context, asked: Asked): Promise<History> {
  authorize(context, "machines.read");
  const machine = await Machine.findByPk(asked.id);
  if (!machine) throw notFound("machine");
  const readings = await Reading.findAll({
    where: { machineId: machine.id },
    order: [["readAt", "DESC"]],
    limit: READINGS_LOOKED_THROUGH + 1,
  });
  const looked = readings.slice(0, READINGS_LOOKED_THROUGH);
  const slots = await MachineBaseline.findAll({
    where: { machineId: machine.id },
    include: [{ model: Baseline, as: "baseline", required: true }],
    order: [["fromAt", "DESC"]],
  });
  const revisionIds = [
    ...looked.map(({ revisionId }) => revisionId),
    ...slots.flatMap(({ baseline }) => baseline?.revisionId ?? []),
  ];
  const reader = await openReader(machine, asked, revisionIds);
  const entries = [
    ...readingEntries(looked, reader),
    ...(await baselineEntries(slots, reader)),
    ...(await deviationEntries(machine.id, asked)),
  ].sort((a, b) => (a.at < b.at ? 1 : -1));
  return {
    machineId: machine.id,
    serial: machine.serial,
    axis: asked.axis ?? null,
    parameter: asked.parameter,
    entries,
    truncated: readings.length > READINGS_LOOKED_THROUGH,
  };
}

async function openReader(machine: Machine, asked: Asked, revisionIds: readonly string[]): Promise<Reader> {
  const { assembly } = await machineAssembly(machine.id);
  const { table: keyTable } = await currentKeyTable(machine.modelId);
  const files = await loadFilesOf(revisionIds);
  const sought = placeKey(asked);
  const known = new Map<string, ParameterValue | null>();
  const read = (own: readonly StoredFile[], layer: Layer | undefined) =>
    mapFiles(own.map(parseFile), { keyTable, assembly, layer }).parameters.find(
      (value) => parameterKey(value) === sought,
    ) ?? null;
  return {
    valueIn: (revisionId, layer) => {
      const key = `${revisionId}|${layer ?? ""}`;
      const value = known.get(key) ?? read(files.get(revisionId) ?? [], layer);
      known.set(key, value);
      return value;
    },
  };
}

function placeKey({ axis, parameter }: { axis?: string | undefined; parameter: ParameterName }): string {
  return parameterKey({ axis: axis ?? null, parameter });
}

const NOTHING: Omit<HistoryEntry, "at" | "source" | "by"> = {
  value: null,
  raw: null,
  line: null,
  layer: null,
  kind: null,
  readingId: null,
  baseline: null,
  change: null,
  until: null,
};

function written(value: ParameterValue | null): Pick<HistoryEntry, "value" | "raw" | "line"> {
  if (!value) return { value: null, raw: null, line: null };
  return { value: presentValue(value), raw: value.source.raw, line: value.source.line };
}

function readingEntries(readings: readonly Reading[], reader: Reader): HistoryEntry[] {
  return readings.map(({ id, readAt, kind, layer, actorName, revisionId }) => ({
    ...NOTHING,
    ...written(reader.valueIn(revisionId, layer)),
    at: readAt.toISOString(),
    source: "reading",
    kind,
    layer,
    readingId: id,
    by: actorName,
  }));
}

async function baselineEntries(slots: readonly MachineBaseline[], reader: Reader): Promise<HistoryEntry[]> {
  const changes = await labelsOf(slots.flatMap(({ changeId }) => changeId ?? []));
  return slots.flatMap(({ baseline, fromAt, untilAt, changeId }) =>
    baseline
      ? [
          {
            ...NOTHING,
            ...written(reader.valueIn(baseline.revisionId, undefined)),
            at: fromAt.toISOString(),
            source: "baseline",
            baseline: baseline.number,
            change: changes.get(changeId ?? "") ?? null,
            until: untilAt?.toISOString() ?? null,
            by: baseline.approvedByName,
          },
        ]
      : [],
  );
}

async function deviationEntries(machineId: string, asked: Asked): Promise<HistoryEntry[]> {
  const deviations = await Deviation.findAll({ where: { machineId } });
  const changes = await labelsOf(deviations.flatMap(({ changeId }) => changeId ?? []));
  return deviations.flatMap(({ edits, fromAt, untilOn, endedAt, changeId, approvedByName }) =>
    edits
      .filter(({ axis, parameter }) => parameterKey({ axis, parameter }) === placeKey(asked))
      .map(({ value, unit, basis }) => ({
        ...NOTHING,
        value: { value, unit, basis: basis ?? null },
        at: fromAt.toISOString(),
        source: "deviation" as const,
        change: changes.get(changeId ?? "") ?? null,
        until: endedAt?.toISOString() ?? untilOn,
        by: approvedByName,
      })),
  );
}

async function labelsOf(ids: readonly string[]): Promise<Map<string, { id: string; label: string }>> {
  const changes = await ChangeRequest.findAll({ where: { id: [...ids] }, attributes: ["id", "number"] });
  return new Map(changes.map(({ id, number }) => [id, { id, label: changeLabel(number) }]));
}
