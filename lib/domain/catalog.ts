import { z } from "zod";
import {
  axisAssemblySchema,
  controllerBoardSchema,
  driverSchema,
  driveTrainSchema,
  loadSchema,
  motorSchema,
  mountSchema,
  supplySchema,
} from "./assembly";

export const CATALOG_KINDS = [
  "motor",
  "driver",
  "controller_board",
  "supply",
  "drive_train",
  "mount",
] as const;
export const catalogKindSchema = z.enum(CATALOG_KINDS);
export type CatalogKind = z.infer<typeof catalogKindSchema>;

export const CATALOG_KIND_WORDS: Record<CatalogKind, { one: string; many: string }> = {
  motor: { one: "motor", many: "motors" },
  driver: { one: "driver", many: "drivers" },
  controller_board: { one: "controller board", many: "controller boards" },
  supply: { one: "supply", many: "supplies" },
  drive_train: { one: "drive train", many: "drive trains" },
  mount: { one: "mount", many: "mounts" },
};

/** The data of one version of a catalog item, by kind; same field names as the assembly. */
export const CATALOG_DATA = {
  motor: motorSchema,
  driver: driverSchema,
  controller_board: controllerBoardSchema,
  supply: supplySchema,
  drive_train: driveTrainSchema,
  mount: mountSchema,
} as const satisfies Record<CatalogKind, z.ZodObject>;

const itemId = z.uuid().nullable();

/** One axis of a machine model: catalog items by id, and what only this axis has. */
export const modelAxisSchema = z.object({
  axis: z.string().trim().min(1).max(40),
  motor_count: z.number().int().min(1).max(8).default(1),
  motor: itemId.default(null),
  driver: itemId.default(null),
  drive_train: itemId.default(null),
  mount: itemId.default(null),
  load: loadSchema.default({}),
  travel_mm: axisAssemblySchema.shape.travel_mm,
  travel_deg: axisAssemblySchema.shape.travel_deg,
  coupled_with: z.array(z.string().min(1).max(40)).max(8).default([]),
});
export type ModelAxis = z.infer<typeof modelAxisSchema>;

/** The hardware of one version of a machine model. */
export const modelHardwareSchema = z.object({
  supply: itemId.default(null),
  controller_board: itemId.default(null),
  enclosure_rise_k: z.number().min(0).max(100).optional(),
  /** Whether a machine of this model can give back stored or running values. */
  has_read_back: z.boolean().default(true),
  axes: z.array(modelAxisSchema).min(1).max(32),
});
export type ModelHardware = z.infer<typeof modelHardwareSchema>;

/** The parts that a machine may have otherwise than its model. */
export const DIFFERING_PARTS = [
  "motor",
  "driver",
  "drive_train",
  "mount",
  "supply",
  "controller_board",
  "sense_resistor",
  "load",
] as const;
export const differingPartSchema = z.enum(DIFFERING_PARTS);
export type DifferingPart = z.infer<typeof differingPartSchema>;

/**
 * A recorded hardware fact of one machine: another catalog item fitted, or measured data of its own
 * (`data` overlays the part's fields), always with the evidence for it.
 */
export const hardwareFactSchema = z.object({
  axis: z.string().min(1).max(40).nullable(),
  part: differingPartSchema,
  itemId: itemId.default(null),
  data: z.record(z.string(), z.union([z.number(), z.string(), z.boolean()])).default({}),
  /** Who read which marking, when; required, since boards of one name differ. */
  evidence: z.string().trim().min(3).max(1000),
});
export type HardwareFact = z.infer<typeof hardwareFactSchema>;
