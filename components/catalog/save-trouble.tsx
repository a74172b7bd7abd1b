"use client";

import { useRouter } from "next/navigation";
import { ProblemError, sentenceOf } from "@/components/api";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";

/** Why a save was refused; where somebody else saved meanwhile, what stands can be loaded. */
export function SaveTrouble({ error, onLoad }: { readonly error: unknown; readonly onLoad: () => void }) {
  const router = useRouter();
  if (!error) return null;
  const moved = error instanceof ProblemError && error.status === 412;
  return (
    <Notice
      title="Not saved"
      live="alert"
      acts={
        moved ? (
          <Button
            onClick={() => {
              onLoad();
              router.refresh();
            }}
          >
            Load what stands now and drop what I typed
          </Button>
        ) : undefined
      }
    >
      <p>{sentenceOf(error)}</p>
    </Notice>
  );
}
