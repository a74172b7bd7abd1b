import { handle, Versioned } from "@/lib/http/handle";
import { keyTableOperations } from "@/lib/schemas/operations/key-tables";
import { setBasis } from "@/lib/services/key-tables/set-basis";

export const POST = handle(keyTableOperations.setBasis, async ({ context, params, body }) => {
  const table = await setBasis(context, { ...body, ...params });
  return new Versioned(table, table.version);
});
