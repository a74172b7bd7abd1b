"use client";

import { useRouter } from "next/navigation";
import { sentenceOf } from "@/components/api";
import { Button } from "@/components/ui/button";
import type { Method } from "@/lib/schemas/operation";
import { useSave } from "./use-save";

export interface PutBackProps {
  /** The version that is put back. */
  readonly version: number;
  readonly method: Method;
  /** Below /api/v1. */
  readonly path: string;
  readonly body: unknown;
  /** The version that stands. */
  readonly ifMatch: number;
}

/** Makes an earlier version stand again, as a version of its own; that undoes what came after it. */
export function PutBack({ version, ...save }: PutBackProps) {
  const router = useRouter();
  const act = useSave<unknown>({ onSaved: () => router.refresh() });
  return (
    <>
      <Button
        variant="quiet"
        busy={act.isPending}
        onClick={() => act.mutate(save)}
        aria-label={`Put version ${version} back`}
      >
        put back
      </Button>
      {act.isError && (
        <p className="field-error" role="alert">
          {sentenceOf(act.error)}
        </p>
      )}
    </>
  );
}
