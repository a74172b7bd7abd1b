"use client";

import { useSyncExternalStore } from "react";
import { Notice } from "@/components/ui/notice";
import { unsentReason } from "./unsent";

/** What is kept does not change while the page is open. */
const unchanging = () => () => undefined;

/** Says on the page of a draft why it was kept but not submitted. */
export function UnsentNotice({ changeId }: { readonly changeId: string }) {
  const reason = useSyncExternalStore(
    unchanging,
    () => unsentReason(changeId),
    () => null,
  );
  if (reason === null) return null;
  return (
    <Notice live="alert" title="Kept as a draft, not submitted">
      {reason} Submit it from the title block when that is settled.
    </Notice>
  );
}
