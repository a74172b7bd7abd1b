import { z } from "zod";

export const revisionKindSchema = z.enum(["baseline", "proposal", "as_found", "as_left", "in_service"]);
export type RevisionKind = z.infer<typeof revisionKindSchema>;
