import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { createChange } from "@/lib/services/changes/create";
import { listChanges } from "@/lib/services/changes/list";

export const GET = handle(changeOperations.list, ({ context, query }) => listChanges(context, query));

export const POST = handle(changeOperations.create, ({ context, body, idempotencyKey }) =>
  createChange(context, body, idempotencyKey),
);
