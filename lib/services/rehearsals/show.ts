import "server-only";
import type { RehearsalView } from "@/lib/schemas/rehearsals";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { rehearsalView } from "./present";

export async function showRehearsal(
  context: Context,
  { id }: { readonly id: string },
): Promise<RehearsalView> {
  authorize(context, "rehearsals.read");
  return rehearsalView(id);
}
