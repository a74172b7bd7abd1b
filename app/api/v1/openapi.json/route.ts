import { handle } from "@/lib/http/handle";
import { openApiDocument } from "@/lib/http/openapi";
import { deskOperations } from "@/lib/schemas/operations/desk";

export const GET = handle(deskOperations.openApi, async () => openApiDocument());
