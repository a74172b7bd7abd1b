import "server-only";
import type { Assembly } from "@/lib/domain/assembly";
import type { Finding } from "@/lib/domain/findings";
import { LAYERS } from "@/lib/domain/readings";
import type { MachineSheet } from "@/lib/schemas/machines-read";
import { Reading } from "@/models/revisions";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { readingRows } from "@/lib/services/readings/rows";
import { momentOf } from "./as-of";
import { machineCondition, type MachineCondition } from "./condition";
import { fittedItems } from "./fitted-items";
import { layerRows } from "./layer-rows";
import { openChanges } from "./open-changes";
import { presentBaseline, presentDeviation, presentDrift } from "./present-drift";
import { statusOf } from "./refresh-status";
import { standingOf } from "./standing";

/** A machine's sheet carries its newest readings; the page Readings has them all. */
const READINGS_SHOWN = 12;

export interface MachineSheetView extends Omit<MachineSheet, "findings" | "assembly"> {
  readonly findings: readonly Finding[];
  readonly assembly: Assembly;
}

interface Asked {
  readonly id: string;
  readonly asOf?: string | undefined;
}

/** All that bears on one machine, now or at a moment in the past. */
export async function showMachine(context: Context, { id, asOf }: Asked): Promise<MachineSheetView> {
  authorize(context, "machines.read");
  const moment = momentOf(context, asOf);
  const condition = await machineCondition(id, moment);
  const { machine, hardware, drift, requiredReport } = condition;
  const { rows, count } = await Reading.findAndCountAll({
    where: { machineId: id },
    order: [["readAt", "DESC"]],
    limit: READINGS_SHOWN,
  });
  return {
    ...head(condition),
    assembly: hardware.assembly,
    facts: hardware.facts.map(({ axis, part, evidence }) => ({ axis, part, evidence })),
    own: [...hardware.evidence],
    ignored: [...hardware.ignored],
    fitted: await fittedItems(machine.modelId, hardware.facts),
    required: presentRequired(condition),
    layers: layerRows(condition),
    standingReadings: presentStanding(condition),
    drift: presentDrift(condition, moment),
    findings: drift?.findings ?? requiredReport?.findings ?? [],
    readings: await readingRows(rows),
    readingsTotal: count,
    changes: await openChanges(machine),
  };
}

function head(condition: MachineCondition) {
  const { machine, hardware } = condition;
  const status = statusOf(condition);

  const { id, serial, state, stateReason, note, version, model, site } = machine;
  return {
    id,
    serial,
    state,
    stateReason,
    note,
    version,
    ...standingOf(state, status),
    model: { id: machine.modelId, code: model?.code ?? "", name: model?.name ?? "" },
    site: { id: machine.siteId, code: site?.code ?? "", name: site?.name ?? "" },
    ambientC: site?.ambientC ?? null,
    hasReadBack: hardware.hasReadBack,
    createdAt: machine.createdAt.toISOString(),
    lastReadAt: status.lastReadAt?.toISOString() ?? null,
    stale: status.stale,
  };
}

function presentRequired({ required }: MachineCondition): MachineSheet["required"] {
  if (!required) return null;
  return {
    baseline: presentBaseline(required.baseline),
    deviations: required.deviations.map(presentDeviation),
    files: required.files.map(({ path, text, bytes, sha256 }, position) => ({
      position,
      path,
      text,
      sha256,
      size: bytes.byteLength,
    })),
    refused: [...required.refused],
  };
}

function presentStanding({ layers }: MachineCondition): MachineSheet["standingReadings"] {
  return LAYERS.flatMap((layer) => {
    const reading = layers[layer]?.reading;
    if (!reading) return [];
    const { id, kind, readAt, firmwareVersion } = reading;
    return [{ readingId: id, layer, kind, readAt: readAt.toISOString(), firmwareVersion }];
  });
}
