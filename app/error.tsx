"use client";

import { useEffect, useRef } from "react";
import { Button, ButtonLink } from "@/components/ui/button";
import { Sheet, SheetHead } from "@/components/ui/sheet";

export interface ErrorPageProps {
  readonly error: Error & { readonly digest?: string };
  readonly reset: () => void;
}

/** What a reader sees when a page could not be made. */
export default function ErrorPage({ error, reset }: ErrorPageProps) {
  const words = useRef<HTMLDivElement>(null);
  useEffect(() => words.current?.focus(), []);
  return (
    <Sheet width="narrow">
      <div ref={words} tabIndex={-1} role="alert">
        <SheetHead
          title="This page could not be made"
          subtitle="Something failed while it was put together. What you had saved before is kept."
        />
      </div>
      <p>Try once more. If it fails again, tell whoever runs Keepstep here, with the number below.</p>
      {error.digest !== undefined && (
        <p>
          Number of the failure: <span className="code">{error.digest}</span>
        </p>
      )}
      <div className="acts">
        <Button variant="primary" onClick={reset}>
          Try again
        </Button>
        <ButtonLink href="/floor">To the floor</ButtonLink>
      </div>
    </Sheet>
  );
}
