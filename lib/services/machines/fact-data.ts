import "server-only";
import type { z } from "zod";
import { loadSchema, setPointSchema } from "@/lib/domain/assembly";
import type { DifferingPart, HardwareFact } from "@/lib/domain/catalog";
import { CATALOG_DATA } from "@/lib/domain/catalog";
import { ServiceError } from "@/lib/services/kernel/errors";

type Fields = Readonly<Record<string, z.ZodType>>;

const SENSE_RESISTOR = setPointSchema.pick({
  sense_resistance_ohm: true,
  sense_resistor_rating_w: true,
  internal_resistance_ohm: true,
});

/** The fields that a part's own data may overlay; those of the set-point are written `set_point.gain`. */
function fieldsOf(part: DifferingPart): Fields {
  if (part === "load") return loadSchema.shape;
  if (part === "sense_resistor") return SENSE_RESISTOR.shape;
  if (part !== "driver") return CATALOG_DATA[part].shape;
  const { set_point: setPoint, ...own } = CATALOG_DATA.driver.shape;
  const inner = Object.entries(setPoint.unwrap().shape);
  return { ...own, ...Object.fromEntries(inner.map(([field, schema]) => [`set_point.${field}`, schema])) };
}

/** Refuses data that no field of the part takes. */
export function requireFittingData({ part, data }: Pick<HardwareFact, "part" | "data">): void {
  const fields = fieldsOf(part);
  for (const [field, value] of Object.entries(data)) {
    const pointer = `/data/${field}`;
    const schema = Object.hasOwn(fields, field) ? fields[field] : undefined;
    if (!schema)
      throw new ServiceError("invalid", `The part ${part} has no field “${field}”. Nothing was stored.`, {
        pointer,
      });
    const read = schema.safeParse(value);
    if (!read.success)
      throw new ServiceError(
        "invalid",
        `The field “${field}” does not fit: ${read.error.issues[0]?.message ?? "not valid"}. Nothing was stored.`,
        { pointer },
      );
  }
}
