import { handle, Versioned } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { editChange } from "@/lib/services/changes/edit";
import { showChange } from "@/lib/services/changes/show";

export const GET = handle(changeOperations.show, async ({ context, params }) => {
  const change = await showChange(context, params.id);
  return new Versioned(change, change.lockVersion);
});

export const PUT = handle(changeOperations.edit, async ({ context, params, body, ifMatch }) => {
  const change = await editChange(context, { id: params.id, edit: body, ifMatch });
  return new Versioned(change, change.lockVersion);
});
