import { handle } from "@/lib/http/handle";
import { testSheetOperations } from "@/lib/schemas/operations/test-sheets";
import { createSheet } from "@/lib/services/test-sheets/create";
import { listSheets } from "@/lib/services/test-sheets/list";

export const GET = handle(testSheetOperations.list, ({ context, query }) => listSheets(context, query));

export const POST = handle(testSheetOperations.create, ({ context, body, idempotencyKey }) =>
  createSheet(context, { ...body, idempotencyKey }),
);
