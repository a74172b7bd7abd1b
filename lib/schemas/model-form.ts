import { z } from "zod";
import { loadSchema } from "@/lib/domain/assembly";
import { axisKind } from "@/lib/domain/axis-kind";
import {
  modelAxisSchema,
  modelHardwareSchema,
  type ModelAxis,
  type ModelHardware,
} from "@/lib/domain/catalog";
import { codeSchema, nameSchema } from "./codes";
import { typedSchema, typedValues } from "./form-fields";
import { checkAxes } from "./machine-models";
import { readTypedNumber } from "./typed-number";

const chosen = z.string().transform((id) => (id === "" ? null : id));

/** A number as typed, held against the stored field's own limits. */
function typedNumber(schema: z.ZodType<number | undefined>, sentence: string) {
  return z.string().transform((typed, context) => {
    const number = readTypedNumber(typed);
    const read = number.ok ? schema.safeParse(number.value) : null;
    if (read?.success) return read.data;
    context.addIssue({ code: "custom", message: number.ok ? sentence : number.sentence });
    return z.NEVER;
  });
}

const axisForm = z.object({
  axis: z.string().trim().min(1, "Give the axis a name.").max(40, "40 characters at most."),
  motor_count: typedNumber(z.number().int().min(1).max(8), "A whole number from 1 to 8."),
  motor: chosen,
  driver: chosen,
  drive_train: chosen,
  mount: chosen,
  load: typedSchema(loadSchema),
  travel_mm: typedNumber(modelAxisSchema.shape.travel_mm, "More than 0 mm."),
  travel_deg: typedNumber(modelAxisSchema.shape.travel_deg, "More than 0 deg."),
  /** Names of axes, separated by commas. */
  coupled_with: z.string().transform((names) =>
    names
      .split(",")
      .map((name) => name.trim())
      .filter((name) => name !== ""),
  ),
});

const hardwareForm = z
  .object({
    supply: chosen,
    controller_board: chosen,
    enclosure_rise_k: typedNumber(modelHardwareSchema.shape.enclosure_rise_k, "From 0 to 100 K."),
    has_read_back: z.boolean(),
    axes: z.array(axisForm).min(1, "A machine model has at least one axis.").max(32, "32 axes at most."),
  })
  .superRefine((hardware, context) => checkAxes(hardware, context));

/** The form of a machine model; its fields are named as the API names them. */
export const modelFormSchema = z.object({ code: codeSchema, name: nameSchema, hardware: hardwareForm });
export type ModelFormValues = z.input<typeof modelFormSchema>;
export type ModelFormData = z.output<typeof modelFormSchema>;
export type AxisFormValues = ModelFormValues["hardware"]["axes"][number];

const numberText = (value: number | undefined): string => (value === undefined ? "" : String(value));

export function axisFormValues(axis?: ModelAxis): AxisFormValues {
  return {
    axis: axis?.axis ?? "",
    motor_count: String(axis?.motor_count ?? 1),
    motor: axis?.motor ?? "",
    driver: axis?.driver ?? "",
    drive_train: axis?.drive_train ?? "",
    mount: axis?.mount ?? "",
    load: typedValues(loadSchema, axis?.load),
    travel_mm: numberText(axis?.travel_mm),
    travel_deg: numberText(axis?.travel_deg),
    coupled_with: axis?.coupled_with.join(", ") ?? "",
  };
}

export interface ModelInForm {
  readonly code: string;
  readonly name: string;
  readonly hardware: ModelHardware;
}

export function modelFormValues(model: ModelInForm | null): ModelFormValues {
  const hardware = model?.hardware;
  return {
    code: model?.code ?? "",
    name: model?.name ?? "",
    hardware: {
      supply: hardware?.supply ?? "",
      controller_board: hardware?.controller_board ?? "",
      enclosure_rise_k: numberText(hardware?.enclosure_rise_k),
      has_read_back: hardware?.has_read_back ?? true,
      axes: hardware ? hardware.axes.map(axisFormValues) : [axisFormValues()],
    },
  };
}

/** Only axes that turn are travelled in degrees. */
export function travelField(driveTrainKind: string | null): "travel_mm" | "travel_deg" {
  return axisKind(driveTrainKind ?? undefined) === "rotary" ? "travel_deg" : "travel_mm";
}
