"use client";

import dynamic from "next/dynamic";
import { useState } from "react";
import { unifiedDiff } from "@/lib/diff/unified";
import { Button } from "@/components/ui/button";

const WholeTexts = dynamic(
  () => import("@/components/revision/whole-texts").then((module) => module.WholeTexts),
  {
    ssr: false,
    loading: () => <p className="quiet">Laying out both texts …</p>,
  },
);

interface WholeTextsOnDemandProps {
  readonly path: string;
  readonly was: string;
  readonly toBe: string;
}

/** The difference as a file that the usual tools apply to the old text. */
function keepDifference({ path, was, toBe }: WholeTextsOnDemandProps): void {
  const difference = unifiedDiff({ path, was: was === "" ? null : was, toBe: toBe === "" ? null : toBe });
  const address = URL.createObjectURL(new Blob([difference], { type: "text/plain" }));
  const link = document.createElement("a");
  link.href = address;
  link.download = `${path.split("/").at(-1) ?? "text"}.diff`;
  link.click();
  URL.revokeObjectURL(address);
}

/** Both texts in full, fetched and laid out only when asked for; and their difference as a file. */
export function WholeTextsOnDemand(props: WholeTextsOnDemandProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button variant="quiet" aria-expanded={open} onClick={() => setOpen(!open)}>
        {open ? "Fold both whole texts away" : "Show both whole texts"}
      </Button>
      {props.was !== props.toBe && (
        <Button variant="quiet" onClick={() => keepDifference(props)}>
          Save the difference (unified)
        </Button>
      )}
      {open && <WholeTexts {...props} />}
    </>
  );
}
