import type { Context } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { authorize } from "@/lib/services/kernel/context";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { modelAssembly } from "@/lib/services/machines/assembly";
import { assignBaseline } from "@/lib/services/machines/baselines";
import { refreshStatus } from "@/lib/services/machines/refresh-status";
import { currentPolicy } from "@/lib/services/policies/ensure";
import { createReading } from "@/lib/services/readings/create";
import { appendRecord } from "@/lib/services/record/append";
import { acceptFiles } from "@/lib/services/revisions/accept";
import type { SentFile } from "@/lib/services/revisions/files";
import { storeRevision } from "@/lib/services/revisions/store";
import { checkConfiguration } from "@/lib/review/check";
import { Baseline } from "@/models/changes";
import { machine, model, person, site } from "./world";

/** A text that every check of the sample hardware passes or nearly passes; values by axis may be replaced. */
export function configuration(values: Readonly<Record<string, string>> = {}): string {
  const axis = (name: string) => {
    const of = (key: string, usual: string) => values[`${name}.${key}`] ?? values[key] ?? usual;
    return [
      `[axis.${name}]`,
      `run_ma = ${of("run_ma", "800")}  # rms`,
      `hold_ma = ${of("hold_ma", "400")}`,
      `microsteps = ${of("microsteps", "16")}`,
      `steps_mm = ${of("steps_mm", "80")}`,
      `speed = ${of("speed", "200")}`,
      `accel = ${of("accel", "1500")}`,
      "",
    ].join("\n");
  };
  return `; written for a test\n${axis("x")}${axis("y")}`;
}

export interface Fleet {
  readonly engineer: Awaited<ReturnType<typeof person>>;
  readonly technician: Awaited<ReturnType<typeof person>>;
  readonly viewer: Awaited<ReturnType<typeof person>>;
  readonly modelId: string;
  readonly siteId: string;
  readonly machineId: string;
  readonly serial: string;
}

/** People, a model with its key table, a site, and one machine without a baseline. */
export async function fleet(): Promise<Fleet> {
  const engineer = await person("engineer");
  const technician = await person("technician");
  const viewer = await person("viewer");
  const { id: modelId } = await model(engineer);
  const { id: siteId } = await site(35);
  const { id: machineId, serial } = await machine(engineer, { modelId, siteId });
  return { engineer, technician, viewer, modelId, siteId, machineId, serial };
}

interface Required {
  readonly modelId: string;
  readonly machineIds: readonly string[];
  readonly files: readonly SentFile[];
}

/** From the context's moment on these machines require that text. */
export async function requireText(context: Context, { modelId, machineIds, files }: Required) {
  const stored = acceptFiles(files, "auto");
  const { table: keyTable } = await currentKeyTable(modelId);
  const { policy } = await currentPolicy();
  const assembly = await modelAssembly(modelId, 35);
  const { parameters } = checkConfiguration({ files: stored, keyTable, assembly, policy });
  return withTransaction(context, async (tx) => {
    authorize(tx, "changes.create");
    const revision = await storeRevision(tx, {
      kind: "baseline",
      modelId,
      machineId: null,
      files: stored,
      parameters,
    });
    const number = (await Baseline.count({ where: { modelId }, transaction: tx.transaction })) + 1;
    const baseline = await Baseline.create(
      { modelId, number, revisionId: revision.id, approvedAt: tx.now, approvedByName: "an approver" },
      { transaction: tx.transaction },
    );
    for (const machineId of machineIds) {
      await assignBaseline(tx, { machineId, baselineId: baseline.id, changeId: null });
      await refreshStatus(tx, machineId);
    }
    await appendRecord(tx, {
      action: "baseline.adopted",
      object: { type: "baseline", id: baseline.id, label: `${number}` },
    });
    return baseline;
  });
}

type Sent = Parameters<typeof createReading>[1];

/** A reading of one file, as found, just now, unless said otherwise. */
export function readingOf(
  context: Context,
  { machineId, text, ...more }: { machineId: string; text: string } & Partial<Sent>,
) {
  return createReading(context, {
    machineId,
    kind: "as_found",
    layer: "file",
    readAt: context.now.toISOString(),
    files: [{ path: "machine.conf", text }],
    idempotencyKey: null,
    ...more,
  });
}

/** The same person at another moment. */
export function at<C extends Context>(context: C, minutes: number): C {
  return { ...context, now: new Date(context.now.getTime() + minutes * 60_000) };
}
