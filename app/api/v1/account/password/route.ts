import { handle } from "@/lib/http/handle";
import { peopleOperations } from "@/lib/schemas/operations/people";
import { changePassword } from "@/lib/services/account/change-password";

export const POST = handle(peopleOperations.changePassword, ({ context, body }) =>
  changePassword(context, body),
);
