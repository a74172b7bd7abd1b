import { handle, Versioned } from "@/lib/http/handle";
import { keyTableOperations } from "@/lib/schemas/operations/key-tables";
import { saveKeyTable } from "@/lib/services/key-tables/save";
import { showKeyTable } from "@/lib/services/key-tables/show";

export const GET = handle(keyTableOperations.showKeyTable, async ({ context, query }) => {
  const table = await showKeyTable(context, query.modelId);
  return new Versioned(table, table.version);
});

export const POST = handle(keyTableOperations.saveKeyTable, async ({ context, body, ifMatch }) => {
  const table = await saveKeyTable(context, { ...body, ifMatch });
  return new Versioned(table, table.version);
});
