import { handle } from "@/lib/http/handle";
import { deskOperations } from "@/lib/schemas/operations/desk";
import { search } from "@/lib/services/search/find";

export const GET = handle(deskOperations.search, ({ context, query }) => search(context, query));
