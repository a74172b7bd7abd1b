import { handle, Versioned } from "@/lib/http/handle";
import { catalogOperations } from "@/lib/schemas/operations/catalog";
import { showItem } from "@/lib/services/catalog/show";
import { updateItem } from "@/lib/services/catalog/update";

export const GET = handle(catalogOperations.showItem, async ({ context, params }) => {
  const item = await showItem(context, params);
  return new Versioned(item, item.version);
});

export const PUT = handle(catalogOperations.updateItem, async ({ context, params, body, ifMatch }) => {
  const item = await updateItem(context, { ...body, ...params, ifMatch });
  return new Versioned(item, item.version);
});
