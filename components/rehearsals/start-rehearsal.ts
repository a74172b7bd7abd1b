import { useRouter } from "next/navigation";
import type { FieldValues, UseFormReturn } from "react-hook-form";
import { z } from "zod";
import { apiCall } from "@/components/api";
import { useSave } from "@/components/forms/use-save";
import type { RehearsalView, StartRehearsal } from "@/lib/schemas/rehearsals";

/** A choice of a list where the empty one means none. */
export const chosen = z.string().transform((id) => (id === "" ? null : id));

/** Starts a rehearsal and goes to its page, where it is seen running. */
export function useStart<Values extends FieldValues, Sent extends StartRehearsal>(
  form: UseFormReturn<Values, unknown, Sent>,
) {
  const router = useRouter();
  return useSave({
    form,
    send: (body: Sent) => apiCall<RehearsalView>("POST", "/rehearsals", { body }),
    onSaved: ({ id }) => router.push(`/rehearsals/${id}`),
  });
}
