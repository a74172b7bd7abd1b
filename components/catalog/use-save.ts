"use client";

import { useMutation } from "@tanstack/react-query";
import type { FieldValues, Path, UseFormSetError } from "react-hook-form";
import { apiCall, fieldErrors, type CallOptions } from "@/components/api";
import type { Method } from "@/lib/schemas/operation";

export interface Save extends CallOptions {
  readonly method: Method;
  readonly path: string;
}

/** Sends a write to the API. */
export function useSave<T>({ onSaved }: { readonly onSaved: (saved: T) => void }) {
  return useMutation({
    mutationFn: ({ method, path, ...options }: Save) => apiCall<T>(method, path, options),
    onSuccess: onSaved,
  });
}

/** Puts the sentences of a refusal beside their fields. */
export function showFieldErrors<T extends FieldValues>(error: unknown, setError: UseFormSetError<T>): void {
  for (const [field, message] of Object.entries(fieldErrors(error)))
    setError(field as Path<T>, { type: "server", message });
}
