import { handle } from "@/lib/http/handle";
import { peopleOperations } from "@/lib/schemas/operations/people";
import { resetPassword } from "@/lib/services/users/reset-password";

export const POST = handle(peopleOperations.resetPassword, ({ context, params, body }) =>
  resetPassword(context, { ...body, ...params }),
);
