import { handle } from "@/lib/http/handle";
import { deskOperations } from "@/lib/schemas/operations/desk";
import { verifyChain } from "@/lib/services/record/verify-chain";

export const GET = handle(deskOperations.verifyRecord, ({ context }) => verifyChain(context));
