import { z } from "zod";
import { answeredInstant } from "./codes";
import { instant, paged, pageQuery } from "./common";

/** A day (from its start or to its end, UTC) or an instant. */
const when = z.union([z.iso.date("A date is written 2026-12-01."), instant]);

export const recordQuery = pageQuery.extend({
  /** Words of what it was about, the act, the actor or the reason; beginnings of words will do. */
  q: z.string().trim().max(200).optional(),
  /** Part of the actor's name. */
  actor: z.string().trim().max(200).optional(),
  actorId: z.uuid().optional(),
  /** An act ("change.approved"), or the beginning of one ("change."). */
  action: z
    .string()
    .trim()
    .regex(/^[a-z_.]{1,80}$/, "An act is written like change.approved.")
    .optional(),
  objectType: z
    .string()
    .trim()
    .regex(/^[a-z_]{1,40}$/, "A kind of object is written like change or machine.")
    .optional(),
  objectId: z.string().trim().max(100).optional(),
  machineId: z.uuid().optional(),
  changeId: z.uuid().optional(),
  from: when.optional(),
  to: when.optional(),
});
export type RecordQuery = z.infer<typeof recordQuery>;

export const recordEventSchema = z.object({
  /** Number in the record, counting from 1. */
  seq: z.string(),
  at: answeredInstant,
  actorKind: z.enum(["person", "token", "system"]),
  actorId: z.uuid().nullable(),
  actorName: z.string(),
  action: z.string(),
  objectType: z.string(),
  objectId: z.string(),
  objectLabel: z.string(),
  machineId: z.uuid().nullable(),
  changeId: z.uuid().nullable(),
  before: z.unknown(),
  after: z.unknown(),
  reason: z.string().nullable(),
  hash: z.string(),
});
export type RecordEventView = z.infer<typeof recordEventSchema>;
export const recordPageSchema = paged(recordEventSchema);
export type RecordPage = z.infer<typeof recordPageSchema>;

export const chainVerdictSchema = z.object({
  events: z.number(),
  brokenAt: z.string().nullable(),
  sentence: z.string(),
});
export type ChainVerdictView = z.infer<typeof chainVerdictSchema>;
