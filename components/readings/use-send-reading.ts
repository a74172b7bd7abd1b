"use client";

import { useMutation } from "@tanstack/react-query";
import { useRef } from "react";
import type { UseFormReturn } from "react-hook-form";
import type { CreatedReading } from "@/lib/schemas/readings";
import { apiCall, fieldErrors, ProblemError } from "@/components/api";
import type { CheckAnswerData } from "./check-outcome";
import type { ChosenMachine } from "./machine-choice";
import { newActKey, sentTexts, type SentText } from "./read-files";
import type { ReadingValues } from "./reading-fields";

export type Outcome =
  | { readonly kind: "kept"; readonly kept: CreatedReading }
  | {
      readonly kind: "checked";
      readonly answer: CheckAnswerData;
      readonly files: readonly SentText[];
      readonly modelId: string;
    };

export interface Sending {
  readonly values: ReadingValues;
  readonly files: readonly File[];
  readonly machine: ChosenMachine | null;
  readonly modelId: string;
}

interface Settings {
  readonly form: UseFormReturn<ReadingValues>;
  readonly onFileTrouble: (sentence: string) => void;
}

const FIELDS = ["serial", "readAt", "firmwareVersion", "note"] as const;

/** Sends a reading or a check. After a lost answer the same key goes out again, so that a reading is kept once. */
export function useSendReading({ form, onFileTrouble }: Settings) {
  const key = useRef<string | null>(null);
  return useMutation({
    mutationFn: async (sending: Sending): Promise<Outcome> => {
      const { values, files, machine } = sending;
      const sent = await sentTexts(files, { path: values.pastedPath, text: values.pasted });
      if (values.mode === "check") return runCheck(sending, sent);
      key.current ??= newActKey();
      const body = { files: sent, format: values.format, layer: values.layer, ...saidOf(values) };
      const path = `/machines/${machine?.id ?? ""}/readings`;
      const kept = await apiCall<CreatedReading>("POST", path, { body, idempotencyKey: key.current });
      return { kind: "kept", kept };
    },
    onSuccess: () => {
      key.current = null;
    },
    onError: (error) => {
      if (isRefusal(error)) key.current = null;
      const errors = fieldErrors(error);
      for (const field of FIELDS) {
        const message = errors[field];
        if (message !== undefined) form.setError(field, { type: "server", message });
      }
      const ofFiles = Object.entries(errors).find(([name]) => name.startsWith("files"))?.[1];
      if (ofFiles !== undefined) onFileTrouble(ofFiles);
    },
  });
}

async function runCheck({ values, machine, modelId }: Sending, files: SentText[]): Promise<Outcome> {
  const place = machine ? { machineId: machine.id } : { machineModelId: modelId };
  const body = { files, format: values.format, layer: values.layer, ...place };
  const answer = await apiCall<CheckAnswerData>("POST", "/check", { body });
  return { kind: "checked", answer, files, modelId: machine?.modelId ?? modelId };
}

/** The server has said that nothing was stored. */
function isRefusal(error: unknown): boolean {
  return error instanceof ProblemError && error.status >= 400 && error.status < 500;
}

function saidOf({ kind, readAt, firmwareVersion, serial, note }: ReadingValues) {
  const moment = readAt === "" ? new Date() : new Date(readAt);
  return {
    kind,
    readAt: moment.toISOString(),
    note,
    ...(firmwareVersion.trim() === "" ? {} : { firmwareVersion }),
    ...(serial.trim() === "" ? {} : { serial }),
  };
}
