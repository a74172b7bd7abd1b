"use client";

import { apiCall } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import type { SiteView } from "@/lib/schemas/sites";

/** Takes a site out of use, or back into use. */
export function RetireSite({ site }: { readonly site: SiteView }) {
  const inUse = site.retiredAt === null;
  const act = useSave({
    send: (retired: boolean) => apiCall("POST", `/sites/${site.id}/retire`, { body: { retired } }),
  });
  return (
    <>
      <Button busy={act.isPending} onClick={() => act.mutate(inUse)}>
        {inUse ? "Take out of use" : "Take back into use"}
      </Button>
      <Refusal error={act.error} title="Not changed" />
    </>
  );
}
