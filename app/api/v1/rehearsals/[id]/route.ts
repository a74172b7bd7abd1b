import { handle } from "@/lib/http/handle";
import { rehearsalOperations } from "@/lib/schemas/operations/rehearsals";
import { showRehearsal } from "@/lib/services/rehearsals/show";

export const GET = handle(rehearsalOperations.showRehearsal, ({ context, params }) =>
  showRehearsal(context, params),
);
