"use client";

import { useState, type ReactNode } from "react";

export interface PlotNumbersProps {
  readonly summary: string;
  /** The table; made only while it is open, since pictures are redrawn at every key. */
  readonly children: () => ReactNode;
}

/** The numbers of a picture as text, for reading aloud and for copying. */
export function PlotNumbers({ summary, children }: PlotNumbersProps) {
  const [open, setOpen] = useState(false);
  return (
    <details onToggle={({ currentTarget }) => setOpen(currentTarget.open)}>
      <summary>{summary}</summary>
      {open && children()}
    </details>
  );
}
