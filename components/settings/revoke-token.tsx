"use client";

import { apiCall } from "@/components/api";
import { ActButton } from "@/components/forms/act-button";

export function RevokeToken({ id, name }: { readonly id: string; readonly name: string }) {
  return (
    <ActButton label="Revoke" title={`Revoke ${name}`} send={() => apiCall("DELETE", `/tokens/${id}`)}>
      <p>Scripts that use this token are refused from now on. A revoked token cannot be brought back.</p>
    </ActButton>
  );
}
