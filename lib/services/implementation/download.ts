import "server-only";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { machineCondition } from "@/lib/services/machines/condition";
import { LotMachine } from "@/models/implementation";
import { noteDownload } from "./note-download";

interface Step {
  readonly changeId: string;
  readonly machineId: string;
}

/** The exact bytes that one machine is to run, for the technician's step of a change. */
export async function downloadForMachine(
  context: Context,
  { changeId, machineId }: Step,
): Promise<{ files: { path: string; base64: string }[] }> {
  authorize(context, "readings.create");
  const place = await LotMachine.findOne({ where: { changeId, machineId, endedAt: null } });
  const { required } = await machineCondition(machineId, context.now);
  if (!place || !required) throw notFound("implementation step");
  await noteDownload(context, { machineId });
  return { files: required.files.map(({ path, bytes }) => ({ path, base64: bytes.toString("base64") })) };
}
