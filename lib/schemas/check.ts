import { z } from "zod";
import { assemblySchema } from "@/lib/domain/assembly";
import { keyRuleSchema, type KeyRule } from "@/lib/domain/key-table";
import { levelSchema } from "@/lib/domain/levels";
import { parameterNameSchema } from "@/lib/domain/parameters";
import { policySchema } from "@/lib/domain/policy";
import { quantityNameSchema } from "@/lib/domain/quantities";
import { layerSchema } from "@/lib/domain/readings";
import { canonicalUnit } from "@/lib/domain/units";
import { sentFilesSchema } from "./files";

/** A member that is null says the same as a member left out: not known. */
function withoutNulls(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(withoutNulls);
  if (typeof value !== "object" || value === null) return value;
  return Object.fromEntries(
    Object.entries(value)
      .filter(([, member]) => member !== null)
      .map(([key, member]) => [key, withoutNulls(member)]),
  );
}

function checkUnits(rules: readonly KeyRule[], context: z.RefinementCtx): void {
  rules.forEach(({ key, unit }, index) => {
    if (unit !== undefined && unit !== "" && canonicalUnit(unit) === null)
      context.addIssue({
        code: "custom",
        path: [index, "unit"],
        message: `The unit “${unit}” of the key ${key} is not known.`,
      });
  });
}

export const sentKeyTable = z.preprocess(
  withoutNulls,
  z.object({
    rules: z.array(keyRuleSchema).max(2000, "A key table has 2000 rows at most.").superRefine(checkUnits),
  }),
);

const sentAssembly = z.preprocess(
  withoutNulls,
  assemblySchema.superRefine(({ axes }, context) => {
    const names = axes.map(({ axis }) => axis.toLowerCase());
    names.forEach((name, index) => {
      if (names.indexOf(name) < index)
        context.addIssue({
          code: "custom",
          path: ["axes", index, "axis"],
          message: `There are two axes named “${axes[index]?.axis ?? name}”.`,
        });
    });
  }),
);

const margins = policySchema.shape;
/** Only what is sent takes the place of the team's own. */
const sentPolicy = z.preprocess(
  withoutNulls,
  z.object({
    torque_margin_below_limit_speed: margins.torque_margin_below_limit_speed.unwrap().optional(),
    torque_margin_above_limit_speed: margins.torque_margin_above_limit_speed.unwrap().optional(),
    junction_limit_c: margins.junction_limit_c.unwrap().optional(),
    stale_after_days: margins.stale_after_days.unwrap().optional(),
    counter_weight_current: margins.counter_weight_current.unwrap().optional(),
    counter_weight_speed: margins.counter_weight_speed.unwrap().optional(),
    counter_weight_acceleration: margins.counter_weight_acceleration.unwrap().optional(),
    counter_weight_corner_speed: margins.counter_weight_corner_speed.unwrap().optional(),
    counter_least_share: margins.counter_least_share.unwrap().optional(),
    counter_raises_current: margins.counter_raises_current.unwrap().optional(),
  }),
);

export const formatSchema = z.string().trim().min(1).max(40).default("auto");

export const checkRequestSchema = z
  .object({
    files: sentFilesSchema,
    /** `auto` or the name of a format. */
    format: formatSchema,
    keyTable: sentKeyTable.optional(),
    assembly: sentAssembly.optional(),
    policy: sentPolicy.optional(),
    machineId: z.uuid().optional(),
    machineModelId: z.uuid().optional(),
    /** Layer that the files were read from; rules of another layer do not apply. */
    layer: layerSchema.optional(),
  })
  .superRefine(({ keyTable, assembly, machineId, machineModelId }, context) => {
    if (machineId !== undefined && machineModelId !== undefined)
      context.addIssue({
        code: "custom",
        path: ["machineModelId"],
        message: "Send machineId or machineModelId, not both.",
      });
    if (machineId !== undefined || machineModelId !== undefined) return;
    if (assembly === undefined)
      context.addIssue({
        code: "custom",
        path: ["assembly"],
        message: "Send an assembly, or machineId or machineModelId in its place.",
      });
    if (keyTable === undefined)
      context.addIssue({
        code: "custom",
        path: ["keyTable"],
        message: "Send a keyTable, or machineId or machineModelId in its place.",
      });
  });
export type CheckRequest = z.input<typeof checkRequestSchema>;

const severity = z.enum(["error", "warning", "note"]);

export const diagnosticViewSchema = z.object({
  code: z.string(),
  severity,
  message: z.string(),
  line: z.number().nullable(),
  column: z.number().nullable(),
});
export type DiagnosticView = z.infer<typeof diagnosticViewSchema>;

export const documentViewSchema = z.object({
  path: z.string(),
  format: z.string(),
  entries: z.number(),
  diagnostics: z.array(diagnosticViewSchema),
});
export type DocumentView = z.infer<typeof documentViewSchema>;

const basisSchema = z.enum(["peak", "rms"]);
const placeSchema = z.object({
  path: z.string(),
  line: z.number(),
  column: z.number(),
  start: z.number(),
  end: z.number(),
  raw: z.string(),
  key: z.string(),
});

export const parameterValueSchema = z.object({
  axis: z.string().nullable(),
  parameter: parameterNameSchema,
  value: z.number(),
  unit: z.string(),
  basis: basisSchema.nullable(),
  typed: z.object({ value: z.number().nullable(), unit: z.string().nullable() }),
  source: placeSchema,
});

export const unmappedSchema = z.object({
  path: z.string(),
  line: z.number(),
  key: z.string(),
  raw: z.string(),
  suggestions: z.array(
    z.object({
      parameter: parameterNameSchema,
      axis: z.string().nullable(),
      unit: z.string().nullable(),
      basis: basisSchema.nullable(),
      score: z.number(),
      reason: z.string(),
    }),
  ),
});

export const findingSchema = z.object({
  ruleId: z.string(),
  level: levelSchema,
  axis: z.string().nullable(),
  parameters: z.array(parameterNameSchema),
  sentence: z.string(),
  value: z.number().nullable(),
  limit: z.number().nullable(),
  nearLimit: z.number().nullable(),
  limitSense: z.enum(["upper", "lower"]).nullable(),
  margin: z.number().nullable(),
  unit: z.string(),
  formula: z.string(),
  source: z.string(),
  caution: z.string().nullable(),
  spans: z.array(placeSchema),
  clearingValue: z
    .object({
      axis: z.string().nullable(),
      parameter: parameterNameSchema,
      value: z.number(),
      unit: z.string(),
    })
    .nullable(),
  needs: z.array(z.string()),
  assumed: z.array(z.string()),
});

export const provenanceSchema = z.object({
  axis: z.string(),
  parameter: z.enum(["run_current", "hold_current"]),
  steps: z.array(z.object({ label: z.string(), text: z.string(), from: z.string() })),
  rms: z.number().nullable(),
  tolerance: z.number().nullable(),
  missing: z.array(z.string()),
});

export const quantitySchema = z.object({
  axis: z.string().nullable(),
  name: quantityNameSchema,
  value: z.number(),
  unit: z.string(),
});

export const checkAnswerSchema = z.object({
  documents: z.array(documentViewSchema),
  parameters: z.array(parameterValueSchema),
  unmapped: z.array(unmappedSchema),
  quantities: z.array(quantitySchema),
  findings: z.array(findingSchema),
  provenance: z.array(provenanceSchema),
  axes: z.array(z.object({ axis: z.string(), kind: z.enum(["linear", "rotary"]) })),
  versions: z.object({ rules: z.string(), policy: z.string() }),
});
