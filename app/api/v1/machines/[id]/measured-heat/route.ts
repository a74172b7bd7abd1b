import { handle } from "@/lib/http/handle";
import { measuredHeatOperations } from "@/lib/schemas/operations/measured-heat";
import { showMeasuredHeat } from "@/lib/services/machines/show-measured-heat";

export const GET = handle(measuredHeatOperations.showMeasuredHeat, ({ context, params }) =>
  showMeasuredHeat(context, params),
);
