import type { AxisAssembly } from "@/lib/domain/assembly";
import type { QuantityName } from "@/lib/domain/quantities";
import { unusable } from "../data";
import type { Missing } from "../types";

/** What holds only where the rotor follows its current without an encoder correcting it. */
const PRESUMES_OPEN_LOOP: ReadonlySet<QuantityName> = new Set<QuantityName>([
  "driver_power",
  "driver_junction_c",
  "driver_current_limit",
  "winding_c",
  "case_c",
  "voltage_limit_speed",
  "torque_available",
  "torque_margin",
  "ramp_torque_margin",
  "start_stop_speed",
  "hold_torque_margin",
  "resonance_hz",
  "static_position_error",
]);

export function presumesOpenLoop(name: QuantityName): boolean {
  return PRESUMES_OPEN_LOOP.has(name);
}

export function isClosedLoop({ driver }: AxisAssembly): boolean {
  return driver?.feedback === "closed_loop";
}

/** A drive with an encoder of its own sets its current as it needs it, and loses no steps as an open one does. */
export function notCovered(axis: string): Missing {
  return unusable(
    "Not covered: this drive closes its own loop, and the check is for drives without feedback.",
    `axes.${axis}.driver.feedback`,
  );
}
