import { handle } from "@/lib/http/handle";
import { peopleOperations } from "@/lib/schemas/operations/people";
import { revokeToken } from "@/lib/services/tokens/revoke";

export const DELETE = handle(peopleOperations.revokeToken, ({ context, params }) =>
  revokeToken(context, params),
);
