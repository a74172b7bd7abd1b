import { handle } from "@/lib/http/handle";
import { readingOperations } from "@/lib/schemas/operations/readings";
import { listReadings } from "@/lib/services/readings/list";

export const GET = handle(readingOperations.listReadings, ({ context, query }) =>
  listReadings(context, query),
);
