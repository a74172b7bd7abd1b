"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm, useWatch } from "react-hook-form";
import { z } from "zod";
import { Form } from "@/components/forms/form";
import { SubmitButton } from "@/components/forms/submit-button";
import { Button } from "@/components/ui/button";
import { FieldGroup, RadioField, TextField } from "@/components/ui/field";
import type { AxisKind } from "@/lib/domain/axis-kind";
import { shownUnit } from "@/lib/domain/units";
import type { MoveChoice, MovedAxis } from "@/lib/review/virtual-move";

/** Assumed where nobody says another; the swing of motors on carriages lies about there (common practice, no source). */
const USUAL_DAMPING = 0.1;

const positive = z.number({ error: "Type a number." }).positive("More than 0.").max(1e9, "Too large.");

/** As typed, in shown units. */
const choiceSchema = z
  .object({
    curve: z.enum(["trapezoid", "s-curve"]),
    distance: positive,
    jerk: positive.nullable(),
    dampingRatio: z.number({ error: "Type a number." }).min(0, "0 or more.").max(2, "At most 2."),
    stiffness: positive.nullable(),
  })
  .refine(({ curve, jerk }) => curve === "trapezoid" || jerk !== null, {
    path: ["jerk"],
    message: "An S-curve needs the jerk.",
  });

type Typed = z.infer<typeof choiceSchema>;

/** N/m in N/mm; N·m/rad as it is. */
function stiffnessUnit(kind: AxisKind): { readonly unit: string; readonly factor: number } {
  return kind === "rotary" ? { unit: "N·m/rad", factor: 1 } : { unit: "N/mm", factor: 1e-3 };
}

/** The value that the form starts with comes as it is, what is typed as text. */
function orEmpty(typed: string | number | null): number | null {
  return typed === "" || typed === null ? null : Number(typed);
}

/** To six digits, as a person would type it. */
function typedNumber(value: number): number {
  return Number(value.toPrecision(6));
}

export interface VirtualMoveFormProps {
  readonly model: MovedAxis;
  readonly running: boolean;
  readonly onStart: (choice: MoveChoice) => void;
  readonly onStop: () => void;
}

/** What to simulate. Speed and acceleration are those of the required configuration. */
export function VirtualMoveForm({ model, running, onStart, onStop }: VirtualMoveFormProps) {
  const length = shownUnit(model.kind === "rotary" ? "rad" : "m");
  const jerk = shownUnit(model.kind === "rotary" ? "rad/s³" : "m/s³");
  const stiffness = stiffnessUnit(model.kind);
  const form = useForm<Typed>({
    resolver: zodResolver(choiceSchema),
    defaultValues: {
      curve: "trapezoid",
      dampingRatio: USUAL_DAMPING,
      stiffness: null,
      jerk: model.jerk ? typedNumber(model.jerk * jerk.factor) : null,
      ...(model.travel === null ? {} : { distance: typedNumber(model.travel * length.factor) }),
    },
  });
  const { errors } = form.formState;
  const curve = useWatch({ control: form.control, name: "curve" });
  const begin = form.handleSubmit((typed) =>
    onStart({
      curve: typed.curve,
      distance: typed.distance / length.factor,
      jerk: typed.jerk === null ? null : typed.jerk / jerk.factor,
      dampingRatio: typed.dampingRatio,
      stiffness: typed.stiffness === null ? null : typed.stiffness / stiffness.factor,
    }),
  );
  return (
    <Form onSubmit={begin}>
      <FieldGroup legend="The move">
        <RadioField
          label="Speed over time"
          options={[
            { value: "trapezoid", label: "Trapezoid" },
            { value: "s-curve", label: "S-curve, jerk limited" },
          ]}
          error={errors.curve?.message}
          {...form.register("curve")}
        />
        <TextField
          label="Distance"
          type="number"
          step="any"
          unit={length.unit}
          help={
            model.travel === null
              ? "The travel of the axis is not known."
              : "The whole travel, unless you type less."
          }
          error={errors.distance?.message}
          {...form.register("distance", { valueAsNumber: true })}
        />
        {curve === "s-curve" && (
          <TextField
            label="Jerk"
            type="number"
            step="any"
            unit={jerk.unit}
            help={model.jerk ? "As in the text." : "The text has no jerk: type one to try."}
            error={errors.jerk?.message}
            {...form.register("jerk", { setValueAs: orEmpty })}
          />
        )}
      </FieldGroup>
      <FieldGroup legend="What no data sheet says">
        <TextField
          label="Damping ratio"
          type="number"
          step="any"
          help="Damping of the rotor's swing as a share of the critical one. 0.1 is an assumption and the result depends on it: try 0.02 and 0.2 too. Where they differ, only the machine can tell."
          error={errors.dampingRatio?.message}
          {...form.register("dampingRatio", { valueAsNumber: true })}
        />
        <TextField
          label="Stiffness of belt or screw"
          optional
          type="number"
          step="any"
          unit={stiffness.unit}
          help="Between motor and load, of the whole axis. Empty: motor and load move as one."
          error={errors.stiffness?.message}
          {...form.register("stiffness", { setValueAs: orEmpty })}
        />
      </FieldGroup>
      <div className="acts">
        <SubmitButton busy={running}>Simulate the move</SubmitButton>
        <Button onClick={onStop} disabled={!running}>
          Stop
        </Button>
      </div>
    </Form>
  );
}
