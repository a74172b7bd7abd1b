import "server-only";
import type { z } from "zod";
import type { Assembly } from "@/lib/domain/assembly";
import type { AxisKind } from "@/lib/domain/axis-kind";
import type { KeyTable } from "@/lib/domain/key-table";
import { axisShapes } from "@/lib/review/axis-shapes";
import { checkConfiguration } from "@/lib/review/check";
import type { CheckReport } from "@/lib/review/types";
import { RULES_VERSION } from "@/lib/rules/version";
import { checkRequestSchema, type CheckRequest, type DocumentView } from "@/lib/schemas/check";
import { Machine } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { machineAssembly, modelAssembly } from "@/lib/services/machines/assembly";
import { currentPolicy } from "@/lib/services/policies/ensure";
import { acceptFiles } from "@/lib/services/revisions/accept";
import { presentDocuments } from "./present";

export interface CheckAnswer extends Omit<CheckReport, "documents"> {
  readonly documents: readonly DocumentView[];
  readonly axes: readonly { readonly axis: string; readonly kind: AxisKind }[];
  readonly versions: { readonly rules: string; readonly policy: string };
}

type Parsed = z.output<typeof checkRequestSchema>;

/** Checks texts without keeping anything. What is sent wins over what is stored. */
export async function runCheck(context: Context, input: CheckRequest): Promise<CheckAnswer> {
  authorize(context, "check.run");
  const request = checkRequestSchema.parse(input);
  const files = acceptFiles(request.files, request.format);
  const stored = await storedSide(request);
  const { version, policy } = await currentPolicy();
  const { documents, ...report } = checkConfiguration({
    files,
    keyTable: stored.keyTable,
    assembly: stored.assembly,
    policy: { ...policy, ...request.policy },
    layer: request.layer,
  });
  return {
    documents: presentDocuments(documents),
    ...report,
    axes: axisShapes(stored.assembly).map(({ axis, kind }) => ({ axis, kind })),
    versions: { rules: RULES_VERSION, policy: request.policy ? `${version}+sent` : String(version) },
  };
}

const NO_RULES: KeyTable = { rules: [] };
const NO_AXES: Assembly = { axes: [] };

/** Assembly and key table that a request is checked with: what it brings, else what is stored of its machine or model. */
export async function storedSide(request: Parsed): Promise<{ assembly: Assembly; keyTable: KeyTable }> {
  const { machineId, machineModelId, assembly, keyTable } = request;
  if (machineId === undefined && machineModelId === undefined)
    return { assembly: assembly ?? NO_AXES, keyTable: keyTable ?? NO_RULES };
  const modelId = machineModelId ?? (await modelOf(machineId ?? ""));
  return {
    assembly: assembly ?? (await storedAssembly(request)),
    keyTable: keyTable ?? (await currentKeyTable(modelId)).table,
  };
}

async function storedAssembly({ machineId, machineModelId }: Parsed): Promise<Assembly> {
  if (machineId !== undefined) return (await machineAssembly(machineId)).assembly;
  return modelAssembly(machineModelId ?? "", null);
}

async function modelOf(machineId: string): Promise<string> {
  const machine = await Machine.findByPk(machineId, { attributes: ["modelId"] });
  if (!machine) throw notFound("machine");
  return machine.modelId;
}
