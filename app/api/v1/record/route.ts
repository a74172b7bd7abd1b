import { handle } from "@/lib/http/handle";
import { deskOperations } from "@/lib/schemas/operations/desk";
import { searchRecord } from "@/lib/services/record/search";

export const GET = handle(deskOperations.searchRecord, ({ context, query }) => searchRecord(context, query));
