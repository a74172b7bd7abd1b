"use client";

import { useMutation } from "@tanstack/react-query";
import { apiCall } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { ChainVerdictView } from "@/lib/schemas/record";

/** Computes the chain of the whole record again and says whether it holds. */
export function VerifyChain() {
  const verify = useMutation({ mutationFn: () => apiCall<ChainVerdictView>("GET", "/record/verify") });
  return (
    <>
      <div className="acts my-4">
        <Button busy={verify.isPending} onClick={() => verify.mutate()}>
          Verify the chain
        </Button>
        {verify.isPending && <span role="status">The whole record is being computed again.</span>}
      </div>
      {verify.data && (
        <Notice
          title={verify.data.brokenAt === null ? "The chain holds" : "The chain is broken"}
          live={verify.data.brokenAt === null ? "status" : "alert"}
        >
          <p>{verify.data.sentence}</p>
        </Notice>
      )}
      <Refusal error={verify.error} title="Not verified" />
    </>
  );
}
