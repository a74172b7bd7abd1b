import "server-only";
import type { HardwareFact } from "@/lib/domain/catalog";
import { factSchema } from "@/lib/schemas/fact-form";
import { formFields } from "@/lib/schemas/form-fields";
import { ServiceError } from "@/lib/services/kernel/errors";

/** Refuses data that no field of the part takes; those of a driver's set-point are written `set_point.gain`. */
export function requireFittingData({ part, data }: Pick<HardwareFact, "part" | "data">): void {
  const fields = new Map(formFields(factSchema(part)).map((field) => [field.path, field]));
  for (const [path, value] of Object.entries(data)) {
    const pointer = `/data/${path}`;
    const field = fields.get(path);
    if (!field)
      throw new ServiceError(
        "invalid",
        `The part ${part.replaceAll("_", " ")} has no field “${path}”. Nothing was stored.`,
        { pointer },
      );
    const read = field.schema.safeParse(value);
    if (!read.success)
      throw new ServiceError(
        "invalid",
        `${field.label} does not fit: ${read.error.issues[0]?.message ?? "not valid"}. Nothing was stored.`,
        { pointer },
      );
  }
}
