import "server-only";
import { may } from "@/lib/policies/decide";
import type { RequiredIndex } from "@/lib/schemas/machines-read";
import { Machine } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";
import { noteDownload } from "@/lib/services/implementation/note-download";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import type { StoredFile } from "@/lib/services/revisions/files";
import { momentOf } from "./as-of";
import { machineAssembly } from "./assembly";
import { requiredConfiguration, type RequiredConfiguration } from "./required";

interface Asked {
  readonly id: string;
  readonly asOf?: string | undefined;
  /** Position of one file; missing: the only one, or the list of several. */
  readonly file?: number | undefined;
}

export type RequiredText =
  | { readonly kind: "file"; readonly file: StoredFile }
  | { readonly kind: "index"; readonly index: RequiredIndex };

/**
 * The exact text that a machine requires: its one file, the file asked for, or the list of its files. A file that goes
 * out to somebody who may put it onto the machine counts as the download of its open step.
 */
export async function requiredText(context: Context, { id, asOf, file }: Asked): Promise<RequiredText> {
  authorize(context, "machines.read");
  const machine = await Machine.findByPk(id);
  if (!machine) throw notFound("machine");
  const required = await requiredOf(machine, momentOf(context, asOf));
  const position = file ?? (required.files.length === 1 ? 0 : undefined);
  if (position === undefined) return { kind: "index", index: presentIndex(machine, required) };
  const chosen = required.files[position];
  if (!chosen)
    throw new ServiceError("not_found", `The required text of ${machine.serial} has no file ${position}.`);
  if (asOf === undefined && may(context.actor, "readings.create"))
    await noteDownload(context, { machineId: machine.id });
  return { kind: "file", file: chosen };
}

async function requiredOf(machine: Machine, asOf: Date): Promise<RequiredConfiguration> {
  const { assembly } = await machineAssembly(machine.id);
  const { table: keyTable } = await currentKeyTable(machine.modelId);
  const required = await requiredConfiguration({ machineId: machine.id, asOf, keyTable, assembly });
  if (!required)
    throw new ServiceError(
      "not_found",
      `No baseline has been released to ${machine.serial} at that time, so it requires no text.`,
    );
  return required;
}

function presentIndex(machine: Machine, { baseline, files, hash }: RequiredConfiguration): RequiredIndex {
  return {
    machineId: machine.id,
    serial: machine.serial,
    baseline: baseline.number,
    contentHash: hash,
    files: files.map(({ path, bytes, sha256 }, position) => ({
      position,
      path,
      size: bytes.byteLength,
      sha256,
    })),
  };
}
