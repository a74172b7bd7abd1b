import { z } from "zod";

export const machineStateSchema = z.enum(["in_service", "out_of_service", "retired"]);
export type MachineState = z.infer<typeof machineStateSchema>;

export const MACHINE_STATE_WORDS: Record<MachineState, string> = {
  in_service: "in service",
  out_of_service: "out of service",
  retired: "retired",
};
