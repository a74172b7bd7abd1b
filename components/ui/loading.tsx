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
