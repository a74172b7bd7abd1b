import { handle, Versioned } from "@/lib/http/handle";
import { catalogOperations } from "@/lib/schemas/operations/catalog";
import { createModel } from "@/lib/services/models/create";
import { listModels } from "@/lib/services/models/list";

export const GET = handle(catalogOperations.listModels, ({ context, query }) => listModels(context, query));

export const POST = handle(catalogOperations.createModel, async ({ context, body }) => {
  const model = await createModel(context, body);
  return new Versioned(model, model.version);
});
