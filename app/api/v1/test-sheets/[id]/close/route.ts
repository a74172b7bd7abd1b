import { handle } from "@/lib/http/handle";
import { testSheetOperations } from "@/lib/schemas/operations/test-sheets";
import { closeSheet } from "@/lib/services/test-sheets/close";

export const POST = handle(testSheetOperations.close, ({ context, params, body }) =>
  closeSheet(context, { ...body, id: params.id }),
);
