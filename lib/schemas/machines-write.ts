import { z } from "zod";
import { differingPartSchema, hardwareFactSchema } from "@/lib/domain/catalog";
import { machineStateSchema } from "@/lib/domain/machines";
import { answeredInstant, evidenceSchema, reasonSchema } from "./codes";

const serialSchema = z
  .string()
  .trim()
  .min(1, "A machine has a serial number.")
  .max(80, "A serial number has 80 characters at most.")
  .regex(/^[^\p{Cc}\p{Cf}]*$/u, "A serial number has no control or hidden characters.");
const noteSchema = z.string().trim().max(2000, "A note has 2000 characters at most.");

export const createMachineSchema = z.object({
  serial: serialSchema,
  modelId: z.uuid("Choose the machine model."),
  siteId: z.uuid("Choose the site."),
  note: noteSchema.default(""),
});
export type CreateMachine = z.infer<typeof createMachineSchema>;

export const updateMachineSchema = z.object({ serial: serialSchema, note: noteSchema });
export type UpdateMachine = z.infer<typeof updateMachineSchema>;

export const moveMachineSchema = z.object({
  siteId: z.uuid("Choose the site."),
  reason: reasonSchema,
});
export type MoveMachine = z.infer<typeof moveMachineSchema>;

/** Also brings a retired machine back. */
export const machineStateChangeSchema = z.object({
  state: z.enum(["in_service", "out_of_service"]),
  reason: reasonSchema,
});
export type MachineStateChange = z.infer<typeof machineStateChangeSchema>;

export const retireMachineSchema = z.object({ reason: reasonSchema });
export type RetireMachine = z.infer<typeof retireMachineSchema>;

export const copyMachineSchema = z.object({
  serial: serialSchema,
  /** Missing: the original's site. */
  siteId: z.uuid().optional(),
  /**
   * With it, the hardware recorded on the original is recorded on the copy too, on this evidence; without it, nothing
   * is: what was read on one machine says nothing about another.
   */
  hardwareEvidence: evidenceSchema.optional(),
});
export type CopyMachine = z.infer<typeof copyMachineSchema>;

export const recordHardwareSchema = hardwareFactSchema.extend({ evidence: evidenceSchema });
export type RecordHardware = z.infer<typeof recordHardwareSchema>;

export const machineViewSchema = z.object({
  id: z.uuid(),
  serial: z.string(),
  modelId: z.uuid(),
  siteId: z.uuid(),
  state: machineStateSchema,
  stateReason: z.string(),
  note: z.string(),
  version: z.number(),
});
export type MachineView = z.infer<typeof machineViewSchema>;

export const hardwareFactViewSchema = z.object({
  id: z.uuid(),
  axis: z.string().nullable(),
  part: differingPartSchema,
  item: z.object({ id: z.uuid(), code: z.string(), name: z.string() }).nullable(),
  data: hardwareFactSchema.shape.data,
  evidence: z.string(),
  recordedByName: z.string(),
  recordedAt: answeredInstant,
  /** null: it stands. */
  endedAt: answeredInstant.nullable(),
});
export type HardwareFactView = z.infer<typeof hardwareFactViewSchema>;

export const machineHardwareSchema = z.object({
  machineId: z.uuid(),
  machineVersion: z.number(),
  facts: z.array(hardwareFactViewSchema),
});
export type MachineHardwareView = z.infer<typeof machineHardwareSchema>;

export const factParams = z.object({ id: z.uuid(), factId: z.uuid() });
