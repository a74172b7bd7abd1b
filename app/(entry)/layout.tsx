import type { ReactNode } from "react";

/** Where people come in: a sheet on an empty desk. */
export default function EntryLayout({ children }: { readonly children: ReactNode }) {
  return <div className="py-6">{children}</div>;
}
