import { idParams } from "@/lib/schemas/common";
import { measuredHeatSchema } from "@/lib/schemas/measured-heat";
import { operation } from "@/lib/schemas/operation";

export const measuredHeatOperations = {
  showMeasuredHeat: operation({
    id: "showMeasuredHeat",
    method: "GET",
    path: "/machines/{id}/measured-heat",
    action: "machines.read",
    summary: "Temperatures measured at a machine's verifications, what was predicted, and what they refine",
    tag: "Machines",
    params: idParams,
    answer: measuredHeatSchema,
  }),
} as const;
