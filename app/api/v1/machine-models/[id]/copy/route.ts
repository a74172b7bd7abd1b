import { handle, Versioned } from "@/lib/http/handle";
import { catalogOperations } from "@/lib/schemas/operations/catalog";
import { copyModel } from "@/lib/services/models/copy";

export const POST = handle(catalogOperations.copyModel, async ({ context, params, body }) => {
  const model = await copyModel(context, { ...body, ...params });
  return new Versioned(model, model.version);
});
