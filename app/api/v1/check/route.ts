import { handle } from "@/lib/http/handle";
import { checkOperations } from "@/lib/schemas/operations/check";
import { runCheck } from "@/lib/services/check/run";

export const POST = handle(checkOperations.runCheck, ({ context, body }) => runCheck(context, body));
