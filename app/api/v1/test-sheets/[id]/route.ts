import { handle } from "@/lib/http/handle";
import { testSheetOperations } from "@/lib/schemas/operations/test-sheets";
import { showSheet } from "@/lib/services/test-sheets/show";

export const GET = handle(testSheetOperations.show, ({ context, params }) => showSheet(context, params.id));
