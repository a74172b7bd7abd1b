"use client";

import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { useState, type ReactNode } from "react";
import { NonceProvider } from "./nonce";

export interface ProvidersProps {
  readonly nonce: string | undefined;
  readonly children: ReactNode;
}

/** What components in the browser share: the page's nonce and the store of fetched data. */
export function Providers({ nonce, children }: ProvidersProps) {
  const [client] = useState(
    () => new QueryClient({ defaultOptions: { queries: { staleTime: 15_000, retry: 1 } } }),
  );
  return (
    <NonceProvider nonce={nonce}>
      <QueryClientProvider client={client}>{children}</QueryClientProvider>
    </NonceProvider>
  );
}
