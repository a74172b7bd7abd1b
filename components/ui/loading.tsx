import type { ReactNode } from "react";

/** What is being worked on; the mark moves unless the reader asked for stillness. */
export function Loading({ children }: { readonly children: ReactNode }) {
  return (
    <div className="loading" role="status">
      <span className="loading-line" aria-hidden="true" />
      <p>{children}</p>
    </div>
  );
}

export interface ProgressProps {
  readonly label: string;
  readonly done: number;
  readonly of: number;
}

/** How much of a long work is done, in words and as a line. */
export function Progress({ label, done, of }: ProgressProps) {
  return (
    <div className="progress">
      <progress value={done} max={of} aria-label={label} />
      <p>
        {label}: {done} of {of}
      </p>
    </div>
  );
}
