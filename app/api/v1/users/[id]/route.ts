import { handle } from "@/lib/http/handle";
import { peopleOperations } from "@/lib/schemas/operations/people";
import { showUser } from "@/lib/services/users/show";
import { updateUser } from "@/lib/services/users/update";

export const GET = handle(peopleOperations.showUser, ({ context, params }) => showUser(context, params));

export const PUT = handle(peopleOperations.updateUser, ({ context, params, body }) =>
  updateUser(context, { ...body, ...params }),
);
