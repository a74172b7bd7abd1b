import { z } from "zod";
import { levelSchema } from "./levels";
import { parameterNameSchema } from "./parameters";

/** A change of a model's baseline, or a permitted deviation of one machine. */
export const changeKindSchema = z.enum(["baseline", "deviation"]);
export type ChangeKind = z.infer<typeof changeKindSchema>;

/** Which machines a change applies to. Machines in service at the release are taken; retired ones never. */
export const effectivitySchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("model") }),
  z.object({ kind: z.literal("sites"), siteIds: z.array(z.uuid()).min(1).max(200) }),
  z.object({ kind: z.literal("machines"), machineIds: z.array(z.uuid()).min(1).max(10_000) }),
]);
export type Effectivity = z.infer<typeof effectivitySchema>;

export const decisionSchema = z.enum(["approved", "declined", "deferred"]);
export type Decision = z.infer<typeof decisionSchema> | "backed_out";

/** What a signature states; shown before signing and kept with it. */
export const SIGNATURE_MEANINGS: Record<Decision, string> = {
  approved:
    "I have evaluated this change with its effects and findings and I approve that it is put onto the machines named in its effectivity.",
  declined: "I have evaluated this change and decline it.",
  deferred: "I have looked at this change and defer the decision.",
  backed_out: "I have evaluated the return to the earlier baseline and approve it.",
};

/** What a comment hangs on. */
export const commentAnchorSchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("change") }),
  z.object({
    kind: z.literal("parameter"),
    axis: z.string().max(40).nullable(),
    parameter: parameterNameSchema,
  }),
  z.object({
    kind: z.literal("line"),
    path: z.string().max(300),
    side: z.enum(["was", "to_be"]),
    line: z.number().int().min(1),
  }),
]);
export type CommentAnchor = z.infer<typeof commentAnchorSchema>;

export const measuredTemperatureSchema = z.object({
  axis: z.string().max(40).nullable(),
  place: z.enum(["case", "winding", "driver", "mount"]),
  celsius: z.number().min(-60).max(400),
});
export type MeasuredTemperature = z.infer<typeof measuredTemperatureSchema>;

/** One parameter of a permitted deviation, SI as everywhere inside. */
export const deviationEditSchema = z.object({
  axis: z.string().max(40).nullable(),
  parameter: parameterNameSchema,
  value: z.number(),
  unit: z.string(),
  basis: z.enum(["peak", "rms"]).optional(),
});
export type DeviationEdit = z.infer<typeof deviationEditSchema>;

/** CR-0042 */
export function changeLabel(number: number): string {
  return `CR-${String(number).padStart(4, "0")}`;
}

/** What a proposal comes to on one machine of its effectivity whose hardware or site differs from the design evaluated. */
export const machineEvaluationSchema = z.object({
  machineId: z.string(),
  serial: z.string(),
  siteName: z.string(),
  level: levelSchema,
  /** Only findings that are graver here than on the design. */
  graver: z.array(
    z.object({
      key: z.string(),
      ruleId: z.string(),
      axis: z.string().nullable(),
      level: levelSchema,
      sentence: z.string(),
    }),
  ),
});
export type MachineEvaluation = z.infer<typeof machineEvaluationSchema>;
