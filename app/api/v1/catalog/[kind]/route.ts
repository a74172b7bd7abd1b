import { handle, Versioned } from "@/lib/http/handle";
import { catalogOperations } from "@/lib/schemas/operations/catalog";
import { createItem } from "@/lib/services/catalog/create";
import { listItems } from "@/lib/services/catalog/list";

export const GET = handle(catalogOperations.listItems, ({ context, params, query }) =>
  listItems(context, { ...query, ...params }),
);

export const POST = handle(catalogOperations.createItem, async ({ context, params, body }) => {
  const item = await createItem(context, { ...body, ...params });
  return new Versioned(item, item.version);
});
