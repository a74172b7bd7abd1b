import { handle, Versioned } from "@/lib/http/handle";
import { catalogOperations } from "@/lib/schemas/operations/catalog";
import { retireModel } from "@/lib/services/models/retire";

export const POST = handle(catalogOperations.retireModel, async ({ context, params, body }) => {
  const model = await retireModel(context, { ...body, ...params });
  return new Versioned(model, model.version);
});
