"use client";

import { useEffect, useState } from "react";
import { Notice } from "@/components/ui/notice";
import { takeUnsent } from "./unsent";

/** Says on the page of a draft why it was kept but not submitted. */
export function UnsentNotice({ changeId }: { readonly changeId: string }) {
  const [reason, setReason] = useState<string | null>(null);
  useEffect(() => {
    const kept = takeUnsent(changeId);
    if (kept !== null) setReason(kept);
  }, [changeId]);
  if (reason === null) return null;
  return (
    <Notice live="alert" title="Kept as a draft, not submitted">
      {reason} Submit it from the title block when that is settled.
    </Notice>
  );
}
