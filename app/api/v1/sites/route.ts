import { handle } from "@/lib/http/handle";
import { deskOperations } from "@/lib/schemas/operations/desk";
import { createSite } from "@/lib/services/sites/create";
import { listSites } from "@/lib/services/sites/list";

export const GET = handle(deskOperations.listSites, ({ context, query }) => listSites(context, query));

export const POST = handle(deskOperations.createSite, ({ context, body }) => createSite(context, body));
