"use client";

import { useMutation } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import type { FieldValues, Path, UseFormReturn } from "react-hook-form";
import { fieldErrors } from "@/components/api";

export interface SaveOptions<Values extends FieldValues, Sent, Answer> {
  readonly form?: UseFormReturn<Values, unknown, Sent>;
  readonly send: (values: Sent) => Promise<Answer>;
  /** After the act; the page is loaded again afterwards. */
  readonly onSaved?: (answer: Answer) => void;
}

/** One act upon the API: it is sent, refusals stand at the fields they are about, then the page shows what stands. */
export function useSave<Values extends FieldValues, Sent, Answer>({
  form,
  send,
  onSaved,
}: SaveOptions<Values, Sent, Answer>) {
  const router = useRouter();
  return useMutation({
    mutationFn: send,
    onSuccess: (answer) => {
      onSaved?.(answer);
      router.refresh();
    },
    onError: (error) => {
      for (const [field, message] of Object.entries(fieldErrors(error)))
        form?.setError(field as Path<Values>, { type: "server", message });
    },
  });
}
