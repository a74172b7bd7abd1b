import { z } from "zod";
import { changeClassSchema, changeStateSchema } from "@/lib/domain/change-states";
import {
  changeKindSchema,
  commentAnchorSchema,
  decisionSchema,
  effectivitySchema,
  machineEvaluationSchema,
  measuredTemperatureSchema,
} from "@/lib/domain/changes";
import { levelSchema } from "@/lib/domain/levels";
import { parameterNameSchema } from "@/lib/domain/parameters";
import { paged, pageQuery } from "./common";
import { sentFilesSchema } from "./files";
import { mergeChoicesSchema } from "./texts";

const title = z.string().trim().min(3, "Say in a few words what changes.").max(160);
const reason = z.string().trim().min(3, "Say why.").max(4000);
const day = z.iso.date();

/** For a model: a change of its baseline. For a machine: a permitted deviation of that machine until a day. */
export const createChangeSchema = z
  .object({
    modelId: z.uuid().optional(),
    machineId: z.uuid().optional(),
    title,
    reason,
    class: changeClassSchema,
    effectivity: effectivitySchema.optional(),
    deviationUntil: day.optional(),
    files: sentFilesSchema,
    note: z.string().trim().max(1000).default(""),
  })
  .refine((change) => (change.modelId === undefined) !== (change.machineId === undefined), {
    message: "A change is made for a model or for one machine.",
    path: ["modelId"],
  })
  .refine((change) => change.machineId === undefined || change.deviationUntil !== undefined, {
    message: "A permitted deviation ends on a day.",
    path: ["deviationUntil"],
  });
export type CreateChange = z.input<typeof createChangeSchema>;

export const editChangeSchema = z.object({
  title: title.optional(),
  reason: reason.optional(),
  class: changeClassSchema.optional(),
  effectivity: effectivitySchema.optional(),
  deviationUntil: day.optional(),
  files: sentFilesSchema.optional(),
  note: z.string().trim().max(1000).default(""),
});
export type EditChange = z.input<typeof editChangeSchema>;

export const dispositionSchema = z.object({
  decision: decisionSchema,
  /** What the approver has before them; another version or hash is refused. */
  proposalVersion: z.number().int().min(1),
  signedContentHash: z.string().length(64),
  password: z.string().min(1, "Your password is part of the signature.").max(200),
  reason: z.string().trim().max(4000).default(""),
  /** By finding key: why it is acceptable. Every over-limit finding needs one to be approved. */
  justifications: z.record(z.string().max(200), z.string().trim().max(4000)).default({}),
});
export type DispositionRequest = z.input<typeof dispositionSchema>;

export const reasonSchema = z.object({ reason });
export const optionalReasonSchema = z.object({ reason: z.string().trim().max(4000).default("") });
export const backOutSchema = z.object({ reason, password: z.string().min(1).max(200) });

export const commentSchema = z.object({
  anchor: commentAnchorSchema,
  body: z.string().trim().min(1, "A comment has words.").max(4000),
  proposalVersion: z.number().int().min(1),
});

export const MAX_ATTACHMENT_BYTES = 10_485_760;
export const verificationSchema = z.object({
  machineId: z.uuid(),
  tested: z.string().trim().min(3, "Say what was tested and how.").max(4000),
  result: z.enum(["pass", "fail"]),
  ambientC: z.number().min(-40).max(100).nullable().default(null),
  temperatures: z.array(measuredTemperatureSchema).max(64).default([]),
  note: z.string().trim().max(4000).default(""),
  /** Only for a model without read-back: the technician states that the text was applied. */
  statement: z.string().trim().max(1000).nullable().default(null),
  attachments: z
    .array(
      z.object({
        name: z.string().trim().min(1).max(200),
        mediaType: z
          .string()
          .trim()
          .max(120)
          .regex(/^[\w.+-]+\/[\w.+-]+$/),
        base64: z.base64(),
      }),
    )
    .max(5)
    .default([]),
});
export type VerificationRequest = z.input<typeof verificationSchema>;

const named = z.object({ id: z.string(), name: z.string() });

export const changeRowSchema = z.object({
  id: z.string(),
  label: z.string(),
  title: z.string(),
  kind: changeKindSchema,
  class: changeClassSchema,
  state: changeStateSchema,
  model: named,
  machine: z.object({ id: z.string(), serial: z.string() }).nullable(),
  authorName: z.string(),
  level: levelSchema,
  /** Its baseline has moved since it was made. */
  stale: z.boolean(),
  submittedAt: z.string().nullable(),
  updatedAt: z.string(),
});
export type ChangeRow = z.infer<typeof changeRowSchema>;
export const changeListSchema = paged(changeRowSchema);

export const changeListQuery = pageQuery.extend({
  state: changeStateSchema.optional(),
  modelId: z.uuid().optional(),
  machineId: z.uuid().optional(),
  q: z.string().trim().max(200).optional(),
});

const revisionFile = z.object({ path: z.string(), format: z.string(), text: z.string() });

/** Values are those of lib/review/types; described loosely here because the core's own types are the contract. */
const core = z.unknown();

export const changeViewSchema = z.object({
  id: z.string(),
  label: z.string(),
  lockVersion: z.number(),
  kind: changeKindSchema,
  class: changeClassSchema,
  state: changeStateSchema,
  title: z.string(),
  reason: z.string(),
  model: named.extend({ code: z.string() }),
  machine: z.object({ id: z.string(), serial: z.string() }).nullable(),
  effectivity: effectivitySchema,
  /** "12 machines of Dosing gantry at North hall". */
  effectivityWords: z.string(),
  deviationUntil: z.string().nullable(),
  author: z.object({ id: z.string().nullable(), name: z.string() }),
  lastEditorId: z.string().nullable(),
  createdAt: z.string(),
  submittedAt: z.string().nullable(),
  decidedAt: z.string().nullable(),
  proposal: z.object({
    version: z.number(),
    editorName: z.string(),
    createdAt: z.string(),
    note: z.string(),
    signedContentHash: z.string(),
    files: z.array(revisionFile),
  }),
  base: z.object({ label: z.string(), files: z.array(revisionFile) }),
  /** Why the proposal must be brought up to date, or null. */
  stale: z.string().nullable(),
  versions: z.array(
    z.object({
      version: z.number(),
      editorName: z.string(),
      createdAt: z.string(),
      note: z.string(),
      signedContentHash: z.string(),
    }),
  ),
  evaluation: z.object({
    level: levelSchema,
    rulesVersion: z.string(),
    policyVersion: z.number(),
    keyTableVersion: z.number(),
    assemblyHash: z.string(),
    /** What the design was evaluated at. */
    ambientC: z.number().nullable(),
    report: core,
    baseReport: core,
    changes: core,
    effects: core,
    comparison: core,
    machines: z.array(machineEvaluationSchema),
    /** Keys of the over-limit findings that need a justification. */
    overKeys: z.array(z.object({ key: z.string(), sentence: z.string() })),
  }),
  comments: z.array(
    z.object({
      id: z.string(),
      anchor: commentAnchorSchema,
      body: z.string(),
      authorName: z.string(),
      proposalVersion: z.number(),
      createdAt: z.string(),
    }),
  ),
  dispositions: z.array(
    z.object({
      decision: z.enum(["approved", "declined", "deferred", "backed_out"]),
      actorName: z.string(),
      at: z.string(),
      meaning: z.string(),
      reason: z.string(),
      justifications: z.record(z.string(), z.string()),
      proposalVersion: z.number(),
      signedHash: z.string(),
      voidAt: z.string().nullable(),
      voidReason: z.string().nullable(),
    }),
  ),
  machines: z.array(
    z.object({
      machineId: z.string(),
      serial: z.string(),
      siteName: z.string(),
      releasedAt: z.string(),
      downloadedAt: z.string().nullable(),
      appliedAt: z.string().nullable(),
      appliedReadingId: z.string().nullable(),
      verifiedAt: z.string().nullable(),
      endedAt: z.string().nullable(),
      /** What is still missing for this machine, in a sentence; null once verified. */
      missing: z.string().nullable(),
      verifications: z.array(
        z.object({
          id: z.string(),
          tested: z.string(),
          result: z.enum(["pass", "fail"]),
          ambientC: z.number().nullable(),
          temperatures: z.array(measuredTemperatureSchema),
          note: z.string(),
          statement: z.string().nullable(),
          actorName: z.string(),
          at: z.string(),
          attachments: z.array(
            z.object({ id: z.string(), name: z.string(), size: z.number(), mediaType: z.string() }),
          ),
        }),
      ),
    }),
  ),
  /** Permitted deviations, open on machines of the effectivity, that hold a parameter which this change moves. */
  deviationsTouched: z.array(
    z.object({
      machineId: z.string(),
      serial: z.string(),
      changeLabel: z.string(),
      axis: z.string().nullable(),
      parameter: parameterNameSchema,
      until: z.string(),
    }),
  ),
});
export type ChangeViewData = z.infer<typeof changeViewSchema>;

/**
 * How a proposal is brought up to date. With `choices` it is merged with the text in force (`base`: what both started
 * from, `ours`: the proposal, `theirs`: the text in force), each conflict as chosen; without, edits that no longer fit
 * are left out and told.
 */
export const bringUpToDateSchema = z.object({
  /** The text in force that was looked at; another one by now is refused. */
  baseHash: z.string().length(64).optional(),
  choices: mergeChoicesSchema.optional(),
});
export type BringUpToDate = z.input<typeof bringUpToDateSchema>;

/** What did not fit when a proposal was brought up to date; it is shown and left to the engineer. */
export const rebaseAnswerSchema = z.object({
  change: z.object({ id: z.string(), label: z.string(), version: z.number() }),
  reapplied: z.array(z.object({ axis: z.string().nullable(), parameter: parameterNameSchema })),
  notFitting: z.array(
    z.object({ axis: z.string().nullable(), parameter: parameterNameSchema, reason: z.string() }),
  ),
  textNotFitting: z.array(z.object({ path: z.string(), line: z.number(), text: z.string() })),
});
