"use client";

import dynamic from "next/dynamic";
import { useState } from "react";
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

/** Both texts in full, fetched and laid out only when asked for. */
export function WholeTextsOnDemand(props: WholeTextsOnDemandProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button variant="quiet" aria-expanded={open} onClick={() => setOpen(!open)}>
        {open ? "Fold both whole texts away" : "Show both whole texts"}
      </Button>
      {open && <WholeTexts {...props} />}
    </>
  );
}
