import { handle, Versioned } from "@/lib/http/handle";
import { catalogOperations } from "@/lib/schemas/operations/catalog";
import { copyItem } from "@/lib/services/catalog/copy";

export const POST = handle(catalogOperations.copyItem, async ({ context, params, body }) => {
  const item = await copyItem(context, { ...body, ...params });
  return new Versioned(item, item.version);
});
