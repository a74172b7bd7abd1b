import { handle, Versioned } from "@/lib/http/handle";
import { keyTableOperations } from "@/lib/schemas/operations/key-tables";
import { acceptSuggestion } from "@/lib/services/key-tables/accept-suggestion";

export const POST = handle(keyTableOperations.acceptRule, async ({ context, params, body }) => {
  const table = await acceptSuggestion(context, { ...body, ...params });
  return new Versioned(table, table.version);
});
