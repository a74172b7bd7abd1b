"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { Form } from "@/components/forms/form";
import { Button } from "@/components/ui/button";
import { SelectField, TextField } from "@/components/ui/field";
import { formatNumber } from "@/lib/domain/units";
import type { Spreads } from "@/lib/review/tolerance-odds";
import { typedNumber } from "@/lib/schemas/typed-field";

const percent = typedNumber(
  z
    .number("Type a number in %.")
    .min(0, "At least 0 %.")
    .max(50, "At most 50 %.")
    .transform((typed) => typed / 100),
);

const SAMPLES = ["500", "2000", "8000"] as const;

const typedSchema = z.object({
  label: percent,
  resistance: percent,
  senseResistor: percent,
  supply: percent,
  ambientK: typedNumber(z.number("Type a number in K.").min(0, "At least 0 K.").max(40, "At most 40 K.")),
  samples: z.enum(SAMPLES).transform(Number),
  seed: typedNumber(
    z
      .number("Type a whole number.")
      .int("A whole number.")
      .min(0, "0 or more.")
      .max(4_294_967_295, "Too large."),
  ),
});
type Typed = z.input<typeof typedSchema>;
export type OddsChoice = z.output<typeof typedSchema>;

export interface ToleranceFormProps {
  readonly spreads: Spreads;
  readonly running: boolean;
  readonly onStart: (choice: OddsChoice) => void;
  readonly onStop: () => void;
}

const shown = (share: number): string => formatNumber(share * 100, 3);

/** How far each datum may be off, and how many samples are drawn. */
export function ToleranceForm({ spreads, running, onStart, onStop }: ToleranceFormProps) {
  const form = useForm<Typed, unknown, OddsChoice>({
    resolver: zodResolver(typedSchema),
    defaultValues: {
      label: shown(spreads.label),
      resistance: shown(spreads.resistance),
      senseResistor: shown(spreads.senseResistor),
      supply: shown(spreads.supply),
      ambientK: String(spreads.ambientK),
      samples: "2000",
      seed: "1",
    },
  });
  const { errors } = form.formState;
  const field = (name: "label" | "resistance" | "senseResistor" | "supply" | "ambientK" | "seed") => ({
    inputMode: "decimal" as const,
    autoComplete: "off",
    error: errors[name]?.message,
    ...form.register(name),
  });
  return (
    <Form onSubmit={form.handleSubmit(onStart)}>
      <div className="field-columns">
        <TextField
          label="Motor label, ±"
          unit="%"
          help="Rated current and holding torque, each by itself."
          {...field("label")}
        />
        <TextField label="Winding resistance, ±" unit="%" {...field("resistance")} />
        <TextField label="Sense resistor, ±" unit="%" {...field("senseResistor")} />
        <TextField label="Supply voltage, ±" unit="%" {...field("supply")} />
        <TextField label="Ambient temperature, ±" unit="K" {...field("ambientK")} />
        <SelectField label="Samples" {...form.register("samples")}>
          {SAMPLES.map((count) => (
            <option key={count} value={count}>
              {count}
            </option>
          ))}
        </SelectField>
        <TextField label="Seed" help="The same seed draws the same samples." {...field("seed")} />
      </div>
      <div className="acts">
        <Button type="submit" busy={running}>
          Work out the odds
        </Button>
        {running && <Button onClick={onStop}>Stop</Button>}
      </div>
    </Form>
  );
}
