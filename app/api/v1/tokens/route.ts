import { handle } from "@/lib/http/handle";
import { peopleOperations } from "@/lib/schemas/operations/people";
import { createToken } from "@/lib/services/tokens/create";
import { listTokens } from "@/lib/services/tokens/list";

export const GET = handle(peopleOperations.listTokens, ({ context, query }) => listTokens(context, query));

export const POST = handle(peopleOperations.createToken, ({ context, body }) => createToken(context, body));
