import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { machinesOfChange } from "@/lib/services/changes/machines-of-change";
import { recordVerification } from "@/lib/services/implementation/verify";

export const GET = handle(changeOperations.verifications, async ({ context, params }) => ({
  machines: await machinesOfChange(context, params.id),
}));

export const POST = handle(changeOperations.verify, ({ context, params, body, idempotencyKey }) =>
  recordVerification(context, { changeId: params.id, request: body, idempotencyKey }),
);
