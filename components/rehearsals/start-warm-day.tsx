"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { warmDaySchema } from "@/lib/domain/rehearsals";
import { typedNumber } from "@/lib/schemas/typed-field";
import { FleetChoice, type NamedChoice } from "./start-fields";
import { chosen, useStart } from "./start-rehearsal";

const typedSchema = z.object({
  question: z.object({ kind: z.literal("warm_day"), riseK: typedNumber(warmDaySchema.shape.riseK) }),
  siteId: chosen,
  modelId: chosen,
});
type Typed = z.input<typeof typedSchema>;
type Sent = z.output<typeof typedSchema>;

export interface StartWarmDayProps {
  readonly sites: readonly NamedChoice[];
  readonly models: readonly NamedChoice[];
}

/** Asks for the fleet in warmer rooms. */
export function StartWarmDay({ sites, models }: StartWarmDayProps) {
  const form = useForm<Typed, unknown, Sent>({
    resolver: zodResolver(typedSchema),
    defaultValues: { question: { kind: "warm_day", riseK: "10" }, siteId: "", modelId: "" },
  });
  const start = useStart(form);
  return (
    <Form onSubmit={form.handleSubmit((values) => start.mutate(values))}>
      <div className="field-columns">
        <TextField
          label="Warmer by"
          unit="K"
          inputMode="decimal"
          autoComplete="off"
          help="Above the design maximum of each site."
          error={form.formState.errors.question?.riseK?.message}
          {...form.register("question.riseK")}
        />
        <FleetChoice
          sites={sites}
          models={models}
          site={form.register("siteId")}
          model={form.register("modelId")}
        />
      </div>
      <Refusal error={start.error} title="Not started" />
      <div className="acts">
        <Button type="submit" variant="primary" busy={start.isPending}>
          Rehearse the warm day
        </Button>
      </div>
    </Form>
  );
}
