import type { ReactNode } from "react";
import { Notice } from "@/components/ui/notice";

/** What an act came to, said beside the form that did it. */
export function Done({ title, children }: { readonly title?: string; readonly children: ReactNode }) {
  return (
    <div className="my-4">
      <Notice live="status" title={title}>
        {children}
      </Notice>
    </div>
  );
}
