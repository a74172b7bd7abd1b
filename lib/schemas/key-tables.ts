import { z } from "zod";
import { keyRuleSchema, type KeyRule } from "@/lib/domain/key-table";
import { needsBasis, parameterDefinition, parameterNameSchema } from "@/lib/domain/parameters";
import { canonicalUnit, unitDimension } from "@/lib/domain/units";
import { answeredInstant } from "./codes";

/** What is wrong with one rule: the field and a sentence; null for a rule that can be used. */
export function ruleTrouble(rule: KeyRule): { field: keyof KeyRule; sentence: string } | null {
  const definition = parameterDefinition(rule.parameter);
  const machineWide = definition.scope === "machine";
  const placeholders = rule.key.split("{axis}").length - 1;
  if (/\{(?!axis\})|(?<!\{axis)\}/.test(rule.key))
    return { field: "key", sentence: "Only {axis} may stand in braces." };
  if (machineWide && (rule.axis !== undefined || placeholders > 0))
    return { field: "axis", sentence: `${definition.label} belongs to the machine, not to an axis.` };
  if (!machineWide && rule.axis === undefined && placeholders === 0)
    return { field: "axis", sentence: "Name the axis, or put {axis} into the key." };
  if (rule.axis !== undefined && placeholders > 0)
    return { field: "axis", sentence: "The key already stands for every axis; leave the axis empty." };
  if (rule.basis !== undefined && !needsBasis(rule.parameter))
    return { field: "basis", sentence: "Only a current is peak or rms." };
  return unitTrouble(rule);
}

function unitTrouble({ parameter, unit }: KeyRule): { field: "unit"; sentence: string } | null {
  if (unit === undefined) return null;
  if (canonicalUnit(unit) === null) return { field: "unit", sentence: `The unit “${unit}” is not known.` };
  const { dimension, label } = parameterDefinition(parameter);
  const found = unitDimension(unit);
  if (found === dimension || (parameter === "hold_current" && found === "share")) return null;
  return { field: "unit", sentence: `“${unit}” is not a unit of ${label.toLowerCase()}.` };
}

/** What a rule speaks about: the key, where it names one the axis, and the layer. */
export function rulePlace(rule: KeyRule): string {
  return [rule.key, rule.axis ?? "", rule.layer ?? ""].join("\n").toLowerCase();
}

/** One key may feed two parameters, but not the same one twice. */
function ruleIdentity(rule: KeyRule): string {
  return `${rulePlace(rule)}\n${rule.parameter}`;
}

function checkRules(rules: readonly KeyRule[], context: z.RefinementCtx): void {
  const seen = new Map<string, number>();
  rules.forEach((rule, index) => {
    const trouble = ruleTrouble(rule);
    if (trouble)
      context.addIssue({ code: "custom", path: [index, trouble.field], message: trouble.sentence });
    const twin = seen.get(ruleIdentity(rule));
    if (twin !== undefined)
      context.addIssue({
        code: "custom",
        path: [index, "key"],
        message: `Row ${twin + 1} says the same already.`,
      });
    seen.set(ruleIdentity(rule), twin ?? index);
  });
}

const usableRuleSchema = keyRuleSchema.superRefine((rule, context) => {
  const trouble = ruleTrouble(rule);
  if (trouble) context.addIssue({ code: "custom", path: [trouble.field], message: trouble.sentence });
});

export const keyTableQuery = z.object({ modelId: z.uuid() });
export const keyTableParams = z.object({ modelId: z.uuid() });

export const saveKeyTableSchema = z.object({
  modelId: z.uuid(),
  rules: z.array(keyRuleSchema).max(2000, "A key table has 2000 rows at most.").superRefine(checkRules),
  /** What changed and why. */
  note: z.string().trim().max(1000, "A note has 1000 characters at most.").default(""),
});
export type SaveKeyTable = z.infer<typeof saveKeyTableSchema>;

export const acceptRuleSchema = z.object({ rule: usableRuleSchema });
export type AcceptRule = z.infer<typeof acceptRuleSchema>;

/** The key as the key table has it, or as the text has it in full. */
export const setBasisSchema = z.object({
  key: z.string().min(1).max(200),
  parameter: parameterNameSchema.refine(needsBasis, "Only a current is peak or rms."),
  basis: z.enum(["peak", "rms"]),
});
export type SetBasis = z.infer<typeof setBasisSchema>;

const keyTableVersionSchema = z.object({
  version: z.number(),
  rules: z.array(keyRuleSchema),
  note: z.string(),
  createdByName: z.string(),
  createdAt: answeredInstant,
});

export const keyTableViewSchema = z.object({
  modelId: z.uuid(),
  /** 0: nobody has made one yet. */
  version: z.number(),
  rules: z.array(keyRuleSchema),
  versions: z.array(keyTableVersionSchema),
});
export type KeyTableView = z.infer<typeof keyTableViewSchema>;
