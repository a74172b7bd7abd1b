import { handle, Versioned } from "@/lib/http/handle";
import { deskOperations } from "@/lib/schemas/operations/desk";
import { savePolicy } from "@/lib/services/policies/save";
import { showPolicies } from "@/lib/services/policies/show";

export const GET = handle(deskOperations.showPolicies, async ({ context }) => {
  const policies = await showPolicies(context);
  return new Versioned(policies, policies.current.version);
});

export const POST = handle(deskOperations.savePolicy, async ({ context, body, ifMatch }) => {
  const saved = await savePolicy(context, { ...body, ifMatch });
  return new Versioned(saved, saved.version);
});
