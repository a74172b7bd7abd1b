import "server-only";
import type { AxisShape } from "@/lib/keytable/types";
import { axisShapes } from "@/lib/review/axis-shapes";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { modelAssembly } from "@/lib/services/machines/assembly";

/** What a key table is tried with: the model's axes, their kind and the travel of a motor turn. */
export async function modelAxisShapes(context: Context, modelId: string): Promise<AxisShape[]> {
  authorize(context, "catalog.read");
  return axisShapes(await modelAssembly(modelId, null));
}
