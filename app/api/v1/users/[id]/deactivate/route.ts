import { handle } from "@/lib/http/handle";
import { peopleOperations } from "@/lib/schemas/operations/people";
import { deactivateUser } from "@/lib/services/users/deactivate";

export const POST = handle(peopleOperations.deactivateUser, ({ context, params, body }) =>
  deactivateUser(context, { ...body, ...params }),
);
