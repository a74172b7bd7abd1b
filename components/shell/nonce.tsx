"use client";

import { createContext, useContext, type ReactNode } from "react";

const Nonce = createContext<string | undefined>(undefined);

/** Hands the page's nonce (Content-Security-Policy) to components whose libraries add style elements. */
export function NonceProvider({
  nonce,
  children,
}: {
  readonly nonce: string | undefined;
  readonly children: ReactNode;
}) {
  return <Nonce value={nonce}>{children}</Nonce>;
}

export function useNonce(): string | undefined {
  return useContext(Nonce);
}
