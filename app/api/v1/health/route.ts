import { handle } from "@/lib/http/handle";
import { deskOperations } from "@/lib/schemas/operations/desk";
import { checkHealth } from "@/lib/services/health/check";

export const GET = handle(deskOperations.health, () => checkHealth());
