import { handle } from "@/lib/http/handle";
import { testSheetOperations } from "@/lib/schemas/operations/test-sheets";
import { testsOfChange } from "@/lib/services/test-sheets/tests-of-change";

export const GET = handle(testSheetOperations.moved, ({ context, params }) =>
  testsOfChange(context, { changeId: params.id, machineId: params.machineId }),
);
