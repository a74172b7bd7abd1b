import "server-only";
import type { Transaction } from "sequelize";
import { Op } from "sequelize";
import type { Layer } from "@/lib/domain/readings";
import { LAYERS } from "@/lib/domain/readings";
import { checkConfiguration } from "@/lib/review/check";
import { driftOf } from "@/lib/review/drift";
import type { Drift } from "@/lib/review/drift-types";
import type { CountedValue, LayerReading } from "@/lib/review/standing";
import { countedValues, standingReadings } from "@/lib/review/standing";
import type { CheckReport } from "@/lib/review/types";
import { MachineModel, Site } from "@/models/catalog";
import { Machine } from "@/models/machines";
import { Reading } from "@/models/revisions";
import { notFound } from "@/lib/services/kernel/errors";
import type { CurrentKeyTable } from "@/lib/services/key-tables/current";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import type { CurrentPolicy } from "@/lib/services/policies/ensure";
import { currentPolicy } from "@/lib/services/policies/ensure";
import type { StoredFile } from "@/lib/services/revisions/files";
import { loadFilesOf } from "@/lib/services/revisions/load";
import type { MachineAssembly } from "./assembly";
import { machineAssembly } from "./assembly";
import type { RequiredConfiguration } from "./required";
import { requiredConfiguration } from "./required";

/** The newest readings that are looked at; older ones cannot stand any more on a machine that is read at all. */
export const READINGS_LOOKED_AT = 500;

/** A standing reading with its files and what they say. */
export interface StandingLayer {
  readonly reading: Reading;
  readonly files: readonly StoredFile[];
  readonly report: CheckReport;
}

/** Everything that bears on where one machine stands at a time. */
export interface MachineCondition {
  readonly machine: Machine;
  readonly hardware: MachineAssembly;
  readonly keyTable: CurrentKeyTable;
  readonly policy: CurrentPolicy;
  /** Null where no baseline has been released to the machine. */
  readonly required: RequiredConfiguration | null;
  readonly requiredReport: CheckReport | null;
  readonly layers: Partial<Record<Layer, StandingLayer>>;
  readonly counted: readonly CountedValue[];
  readonly drift: Drift | null;
}

/** Works out a machine's condition from the stored facts; nothing is written. */
export async function machineCondition(
  machineId: string,
  asOf: Date,
  transaction?: Transaction,
): Promise<MachineCondition> {
  const machine = await Machine.findByPk(machineId, {
    include: [
      { model: MachineModel, as: "model", required: true },
      { model: Site, as: "site", required: true },
    ],
    transaction: transaction ?? null,
  });
  if (!machine) throw notFound("machine");
  const hardware = await machineAssembly(machineId, transaction);
  const keyTable = await currentKeyTable(machine.modelId, transaction);
  const policy = await currentPolicy(transaction);
  const shared = { assembly: hardware.assembly, keyTable: keyTable.table, policy: policy.policy };
  const required = await requiredConfiguration({ ...shared, machineId, asOf, transaction });
  const requiredReport = required && checkConfiguration({ ...shared, files: required.files });
  const layers = await standingLayers({ machineId, asOf, transaction, shared });
  const counted = countedValues(layers.map(({ reading, report }) => layerReading(reading, report)));
  const drift =
    requiredReport &&
    driftOf({ required: requiredReport, counted, assembly: shared.assembly, policy: shared.policy, asOf });
  const byLayer = Object.fromEntries(layers.map((layer) => [layer.reading.layer, layer]));
  return { machine, hardware, keyTable, policy, required, requiredReport, layers: byLayer, counted, drift };
}

function layerReading(reading: Reading, report: CheckReport): LayerReading {
  return { reading: { ...readingFact(reading) }, parameters: report.parameters };
}

/** A reading row as the core's rule of layers takes it. */
export function readingFact(reading: Reading) {
  const { id, kind, layer, readAt, receivedAt, firmwareVersion } = reading;
  return { id, kind, layer, readAt, receivedAt, firmwareVersion };
}

interface LayersSought {
  readonly machineId: string;
  readonly asOf: Date;
  readonly transaction?: Transaction | undefined;
  readonly shared: Omit<Parameters<typeof checkConfiguration>[0], "files" | "layer">;
}

async function standingLayers({
  machineId,
  asOf,
  transaction,
  shared,
}: LayersSought): Promise<StandingLayer[]> {
  const rows = await Reading.findAll({
    where: { machineId, readAt: { [Op.lte]: asOf } },
    order: [["readAt", "DESC"]],
    limit: READINGS_LOOKED_AT,
    transaction: transaction ?? null,
  });
  const byId = new Map(rows.map((row) => [row.id, row]));
  const { byLayer } = standingReadings(rows.map(readingFact), asOf);
  const standing = LAYERS.flatMap((layer) => byId.get(byLayer[layer]?.id ?? "") ?? []);
  const files = await loadFilesOf(
    standing.map(({ revisionId }) => revisionId),
    transaction,
  );
  return standing.map((reading) => {
    const own = files.get(reading.revisionId) ?? [];
    return {
      reading,
      files: own,
      report: checkConfiguration({ ...shared, files: own, layer: reading.layer }),
    };
  });
}
