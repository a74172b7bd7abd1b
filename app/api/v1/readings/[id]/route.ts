import { handle } from "@/lib/http/handle";
import { readingOperations } from "@/lib/schemas/operations/readings";
import { showReading } from "@/lib/services/readings/show";

export const GET = handle(readingOperations.showReading, ({ context, params }) =>
  showReading(context, params.id),
);
