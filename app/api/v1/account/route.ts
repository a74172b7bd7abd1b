import { handle } from "@/lib/http/handle";
import { peopleOperations } from "@/lib/schemas/operations/people";
import { showAccount } from "@/lib/services/account/show";

export const GET = handle(peopleOperations.showAccount, ({ context }) => showAccount(context));
