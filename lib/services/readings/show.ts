import "server-only";
import { axisKind, type AxisKind } from "@/lib/domain/axis-kind";
import { checkConfiguration } from "@/lib/review/check";
import { standingReadings } from "@/lib/review/standing";
import type { CheckReport } from "@/lib/review/types";
import { RULES_VERSION } from "@/lib/rules/version";
import type { DocumentView } from "@/lib/schemas/check";
import type {
  ReadingRow,
  ReadingStanding,
  readingFileSchema,
  readingViewSchema,
} from "@/lib/schemas/readings";
import type { z } from "zod";
import { MachineModel, Site } from "@/models/catalog";
import { Machine } from "@/models/machines";
import { Reading, type Evaluation } from "@/models/revisions";
import { presentDocuments } from "@/lib/services/check/present";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { machineAssembly } from "@/lib/services/machines/assembly";
import { readingFact, READINGS_LOOKED_AT } from "@/lib/services/machines/condition";
import { currentPolicy } from "@/lib/services/policies/ensure";
import type { StoredFile } from "@/lib/services/revisions/files";
import { loadFiles } from "@/lib/services/revisions/load";
import { evaluationsWhenKept, presentReading } from "./rows";

export interface ReadingView
  extends
    Omit<ReadingRow, "files">,
    Pick<z.infer<typeof readingViewSchema>, "versions" | "whenKept">,
    Omit<CheckReport, "documents" | "quantities"> {
  readonly serial: string | null;
  readonly revisionId: string;
  readonly standing: ReadingStanding;
  readonly files: readonly z.infer<typeof readingFileSchema>[];
  readonly documents: readonly DocumentView[];
  readonly axes: readonly { readonly axis: string; readonly kind: AxisKind }[];
}

/** A reading with its texts, checked anew with the key table, the hardware and the policy of this moment. */
export async function showReading(context: Context, id: string): Promise<ReadingView> {
  authorize(context, "readings.read");
  const reading = await Reading.findByPk(id);
  if (!reading) throw notFound("reading");
  const machine = await Machine.findByPk(reading.machineId, {
    include: [
      { model: MachineModel, as: "model", required: true },
      { model: Site, as: "site", required: true },
    ],
  });
  if (!machine) throw notFound("reading");
  const files = await loadFiles(reading.revisionId);
  const { assembly } = await machineAssembly(machine.id);
  const keyTable = await currentKeyTable(machine.modelId);
  const { version, policy } = await currentPolicy();
  const { layer } = reading;
  const report = checkConfiguration({ files, keyTable: keyTable.table, assembly, policy, layer });
  const { documents, parameters, findings, provenance, unmapped } = report;
  const whenKept = (await evaluationsWhenKept([reading])).get(reading.id);
  return {
    ...presentReading({ reading, machine }, [], whenKept?.level ?? null),
    serial: reading.serial,
    revisionId: reading.revisionId,
    standing: await standingOfReading(reading, context.now),
    files: files.map(presentFile),
    documents: presentDocuments(documents),
    parameters,
    findings,
    provenance,
    unmapped,
    axes: assembly.axes.map(({ axis, drive_train }) => ({ axis, kind: axisKind(drive_train?.kind) })),
    versions: { rules: RULES_VERSION, policy: String(version), keyTable: keyTable.version },
    whenKept: whenKept ? presentEvaluation(whenKept) : null,
  };
}

function presentEvaluation(evaluation: Evaluation) {
  return {
    level: evaluation.level,
    rules: evaluation.rulesVersion,
    policy: String(evaluation.policyVersion),
    at: evaluation.createdAt.toISOString(),
  };
}

function presentFile({ bytes, ...file }: StoredFile, position: number) {
  return { position, size: bytes.byteLength, ...file };
}

/** Whether a reading still says something about its machine now. */
async function standingOfReading(reading: Reading, asOf: Date): Promise<ReadingStanding> {
  const rows = await Reading.findAll({
    where: { machineId: reading.machineId },
    order: [["readAt", "DESC"]],
    limit: READINGS_LOOKED_AT,
  });
  const { byLayer, expired, replaced } = standingReadings(rows.map(readingFact), asOf);
  if (byLayer[reading.layer]?.id === reading.id) return { state: "counts" };
  const ended = [...expired, ...replaced].find((end) => end.reading.id === reading.id);
  if (!ended) return { state: "past" };
  const { because, by } = ended;
  return { state: "ended", because, byReadingId: by.id, at: by.readAt.toISOString() };
}
