import { z } from "zod";
import { levelSchema } from "@/lib/domain/levels";
import {
  hottestRoomSchema,
  rehearsalQuestionSchema,
  rehearsalStateSchema,
  rehearsedFindingSchema,
} from "@/lib/domain/rehearsals";
import { answeredInstant } from "./codes";
import { paged, pageQuery } from "./common";

export const startRehearsalSchema = z.object({
  question: rehearsalQuestionSchema,
  /** Only machines of this site; null: of all sites. */
  siteId: z.uuid().nullable().default(null),
  modelId: z.uuid().nullable().default(null),
});
export type StartRehearsal = z.input<typeof startRehearsalSchema>;

export const rehearsalRowSchema = z.object({
  id: z.uuid(),
  title: z.string(),
  state: rehearsalStateSchema,
  startedByName: z.string(),
  startedAt: answeredInstant,
  endedAt: answeredInstant.nullable(),
  /** Machines that it goes through, and how many it has come to. */
  machines: z.number(),
  rehearsed: z.number(),
  /** Over limit in the rehearsal on a check that is not over limit today. */
  newlyOver: z.number(),
});
export type RehearsalRow = z.infer<typeof rehearsalRowSchema>;
export const rehearsalPageSchema = paged(rehearsalRowSchema);
export type RehearsalPage = z.infer<typeof rehearsalPageSchema>;
export const rehearsalQuery = pageQuery;

export const rehearsalViewSchema = rehearsalRowSchema.extend({
  question: rehearsalQuestionSchema,
  rulesVersion: z.string(),
  policyVersion: z.number(),
  /** Machines that do not carry what is to be swapped. */
  notConcerned: z.number(),
  /** Machines about which nothing can be said: no baseline, or a failure that is named. */
  withoutAnswer: z.number(),
});
export type RehearsalView = z.infer<typeof rehearsalViewSchema>;

export const rehearsalMachineQuery = pageQuery.extend({
  /** `newly_over` by site, then the coldest hottest room first; `all` likewise, with the machines that pass. */
  show: z.enum(["newly_over", "all"]).default("newly_over"),
});
export type RehearsalMachineQuery = z.infer<typeof rehearsalMachineQuery>;

export const rehearsalMachineSchema = z.object({
  machineId: z.uuid(),
  serial: z.string(),
  modelName: z.string(),
  siteId: z.uuid(),
  siteName: z.string(),
  /** Design maximum of the site, °C. */
  siteAmbientC: z.number().nullable(),
  was: levelSchema,
  toBe: levelSchema,
  axes: z.array(z.string()),
  graver: z.array(rehearsedFindingSchema),
  hottestRoom: hottestRoomSchema.nullable(),
  trouble: z.string().nullable(),
});
export type RehearsalMachineView = z.infer<typeof rehearsalMachineSchema>;
export const rehearsalMachinePageSchema = paged(rehearsalMachineSchema);
export type RehearsalMachinePage = z.infer<typeof rehearsalMachinePageSchema>;
