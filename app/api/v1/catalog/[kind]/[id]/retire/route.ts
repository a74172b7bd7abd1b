import { handle, Versioned } from "@/lib/http/handle";
import { catalogOperations } from "@/lib/schemas/operations/catalog";
import { retireItem } from "@/lib/services/catalog/retire";

export const POST = handle(catalogOperations.retireItem, async ({ context, params, body }) => {
  const item = await retireItem(context, { ...body, ...params });
  return new Versioned(item, item.version);
});
