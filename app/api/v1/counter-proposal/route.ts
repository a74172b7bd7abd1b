import { handle } from "@/lib/http/handle";
import { checkOperations } from "@/lib/schemas/operations/check";
import { counterPropose } from "@/lib/services/check/counter-proposal";

export const POST = handle(checkOperations.counterProposal, ({ context, body }) =>
  counterPropose(context, body),
);
