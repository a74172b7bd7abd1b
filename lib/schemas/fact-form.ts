import { z } from "zod";
import { driverSchema, loadSchema, setPointSchema } from "@/lib/domain/assembly";
import {
  CATALOG_DATA,
  catalogKindSchema,
  differingPartSchema,
  type DifferingPart,
} from "@/lib/domain/catalog";
import { evidenceSchema } from "./codes";
import { formFields, typedSchema, typedValues, type FieldData, type TypedValues } from "./form-fields";

/** The fields that a machine may have of its own for a part. */
export function factSchema(part: DifferingPart): z.ZodObject {
  if (part === "load") return loadSchema;
  if (part === "sense_resistor")
    return setPointSchema.pick({
      sense_resistance_ohm: true,
      sense_resistor_rating_w: true,
      internal_resistance_ohm: true,
    });
  return part === "driver" ? driverSchema : CATALOG_DATA[part];
}

/** Whether a part belongs to the machine and not to an axis. */
export function isMachinePart(part: DifferingPart): boolean {
  return part === "supply" || part === "controller_board";
}

/** Whether another item of the catalog can be fitted in the place of the part. */
export function isCatalogPart(part: DifferingPart): boolean {
  return catalogKindSchema.safeParse(part).success;
}

type Flat = Record<string, number | string | boolean>;

/** Nested data as a fact keeps them: `set_point.gain`. */
function flattened(part: DifferingPart, data: FieldData): Flat {
  const values = formFields(factSchema(part)).map(({ path }) => {
    const [outer, inner] = path.split(".");
    const at = outer === undefined ? undefined : data[outer];
    return [path, inner === undefined ? at : (at as FieldData | undefined)?.[inner]] as const;
  });
  return Object.fromEntries(values.filter(([, value]) => value !== undefined)) as Flat;
}

export interface FactFormValues {
  readonly part: DifferingPart;
  readonly axis: string;
  readonly itemId: string;
  readonly evidence: string;
  readonly data: TypedValues;
}

export function emptyFact(part: DifferingPart): FactFormValues {
  return { part, axis: "", itemId: "", evidence: "", data: typedValues(factSchema(part), undefined) };
}

/** The form of one recorded fact about a part. */
export function factFormSchema(part: DifferingPart) {
  return z
    .object({
      part: differingPartSchema,
      axis: z.string().transform((axis) => (axis === "" ? null : axis)),
      itemId: z.string().transform((id) => (id === "" ? null : id)),
      evidence: evidenceSchema,
      data: typedSchema(factSchema(part)).transform((data) => flattened(part, data)),
    })
    .superRefine(({ itemId, data }, context) => {
      if (itemId !== null || Object.keys(data).length > 0) return;
      context.addIssue({
        code: "custom",
        path: ["itemId"],
        message: "Choose the item that is fitted, or give at least one value.",
      });
    });
}
