import { handle } from "@/lib/http/handle";
import { testSheetOperations } from "@/lib/schemas/operations/test-sheets";
import { enterOnSheet } from "@/lib/services/test-sheets/enter";

export const POST = handle(testSheetOperations.enter, ({ context, params, body }) =>
  enterOnSheet(context, { ...body, id: params.id }),
);
