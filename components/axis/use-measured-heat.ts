import { useQuery } from "@tanstack/react-query";
import { apiCall } from "@/components/api";
import type { MeasuredHeatView } from "@/lib/schemas/measured-heat";

/** Temperatures measured at the verifications of a machine. */
export function useMeasuredHeat(machineId: string) {
  return useQuery({
    queryKey: ["measured-heat", machineId],
    queryFn: ({ signal }) =>
      apiCall<MeasuredHeatView>("GET", `/machines/${machineId}/measured-heat`, { signal }),
  });
}
