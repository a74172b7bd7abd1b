import { handle } from "@/lib/http/handle";
import { deskOperations } from "@/lib/schemas/operations/desk";
import { retireSite } from "@/lib/services/sites/retire";

export const POST = handle(deskOperations.retireSite, ({ context, params, body }) =>
  retireSite(context, { ...body, ...params }),
);
