import { handle, Versioned } from "@/lib/http/handle";
import { catalogOperations } from "@/lib/schemas/operations/catalog";
import { showModel } from "@/lib/services/models/show";
import { updateModel } from "@/lib/services/models/update";

export const GET = handle(catalogOperations.showModel, async ({ context, params }) => {
  const model = await showModel(context, params.id);
  return new Versioned(model, model.version);
});

export const PUT = handle(catalogOperations.updateModel, async ({ context, params, body, ifMatch }) => {
  const model = await updateModel(context, { ...body, ...params, ifMatch });
  return new Versioned(model, model.version);
});
