import { z } from "zod";
import { catalogKindSchema, modelHardwareSchema } from "@/lib/domain/catalog";
import { answeredInstant, codeSchema, nameSchema } from "./codes";
import { pageQuery, paged } from "./common";

interface NamedAxes {
  readonly axes: readonly { readonly axis: string; readonly coupled_with: readonly string[] }[];
}

/** Axis names differ without regard to case, and a coupled axis is another axis of the same model. */
export function checkAxes(hardware: NamedAxes, context: z.RefinementCtx): void {
  const names = hardware.axes.map(({ axis }) => axis.toLowerCase());
  hardware.axes.forEach(({ axis, coupled_with }, index) => {
    if (names.indexOf(axis.toLowerCase()) < index)
      context.addIssue({
        code: "custom",
        path: ["axes", index, "axis"],
        message: `There are two axes named “${axis}”. Give each its own name.`,
      });
    coupled_with.forEach((other, place) => {
      const known = names.includes(other.toLowerCase()) && other.toLowerCase() !== axis.toLowerCase();
      if (!known)
        context.addIssue({
          code: "custom",
          path: ["axes", index, "coupled_with", place],
          message: `“${other}” is not another axis of this model.`,
        });
    });
  });
}

const hardwareSchema = modelHardwareSchema.superRefine(checkAxes);

export const createModelSchema = z.object({ code: codeSchema, name: nameSchema, hardware: hardwareSchema });
export type CreateModel = z.infer<typeof createModelSchema>;

export const updateModelSchema = z.object({ name: nameSchema, hardware: hardwareSchema });
export type UpdateModel = z.infer<typeof updateModelSchema>;

export const copyModelSchema = z.object({
  code: codeSchema,
  name: nameSchema,
  /** Whether the copy starts with the key table of its original. */
  withKeyTable: z.boolean().default(true),
});
export type CopyModel = z.infer<typeof copyModelSchema>;

export const modelQuery = pageQuery.extend({
  q: z.string().trim().max(200).optional(),
  retired: z.enum(["yes", "no", "all"]).default("no"),
});
export type ModelQuery = z.infer<typeof modelQuery>;

export const modelRowSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  name: z.string(),
  version: z.number(),
  retiredAt: answeredInstant.nullable(),
  axes: z.array(z.string()),
  /** Machines that are not retired. */
  machines: z.number(),
  /** 0: nobody has made a key table yet. */
  keyTableVersion: z.number(),
});
export type ModelRow = z.infer<typeof modelRowSchema>;
export const modelPageSchema = paged(modelRowSchema);
export type ModelPage = z.infer<typeof modelPageSchema>;

const modelVersionSchema = z.object({
  version: z.number(),
  hardware: modelHardwareSchema,
  createdByName: z.string(),
  createdAt: answeredInstant,
});
export type ModelVersion = z.infer<typeof modelVersionSchema>;

export const modelViewSchema = modelRowSchema.extend({
  hardware: modelHardwareSchema,
  /** Every catalog item that a version names, for its code and name. */
  items: z.array(
    z.object({
      id: z.uuid(),
      kind: catalogKindSchema,
      code: z.string(),
      name: z.string(),
      retired: z.boolean(),
    }),
  ),
  versions: z.array(modelVersionSchema),
});
export type ModelView = z.infer<typeof modelViewSchema>;
