import { handle } from "@/lib/http/handle";
import { readingOperations } from "@/lib/schemas/operations/readings";
import { createReading } from "@/lib/services/readings/create";

export const POST = handle(readingOperations.createReading, ({ context, params, body, idempotencyKey }) =>
  createReading(context, { ...body, machineId: params.id, idempotencyKey }),
);
