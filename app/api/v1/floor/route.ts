import { handle } from "@/lib/http/handle";
import { machineOperations } from "@/lib/schemas/operations/machines";
import { showFloor } from "@/lib/services/floor/show";

export const GET = handle(machineOperations.showFloor, ({ context, query }) => showFloor(context, query));
