import { handle } from "@/lib/http/handle";
import { peopleOperations } from "@/lib/schemas/operations/people";
import { createUser } from "@/lib/services/users/create";
import { listUsers } from "@/lib/services/users/list";

export const GET = handle(peopleOperations.listUsers, ({ context, query }) => listUsers(context, query));

export const POST = handle(peopleOperations.createUser, ({ context, body }) => createUser(context, body));
