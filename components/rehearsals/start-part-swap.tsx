"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm, useWatch } from "react-hook-form";
import { z } from "zod";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { Button } from "@/components/ui/button";
import { SelectField } from "@/components/ui/field";
import { partSwapSchema } from "@/lib/domain/rehearsals";
import type { ItemChoice } from "@/lib/schemas/catalog";
import { FleetChoice } from "./start-fields";
import { chosen, useStart } from "./start-rehearsal";
import type { StartWarmDayProps } from "./start-warm-day";

const typedSchema = z.object({
  question: z.object({ ...partSwapSchema.shape, replacesId: chosen }),
  siteId: chosen,
  modelId: chosen,
});
type Typed = z.input<typeof typedSchema>;
type Sent = z.output<typeof typedSchema>;

export interface StartPartSwapProps extends StartWarmDayProps {
  readonly items: readonly ItemChoice[];
}

/** Asks for the fleet with another motor or driver fitted. */
export function StartPartSwap({ sites, models, items }: StartPartSwapProps) {
  const form = useForm<Typed, unknown, Sent>({
    resolver: zodResolver(typedSchema),
    defaultValues: {
      question: { kind: "part_swap", part: "motor", itemId: "", replacesId: "" },
      siteId: "",
      modelId: "",
    },
  });
  const start = useStart(form);
  const part = useWatch({ control: form.control, name: "question.part" });
  const offered = items.filter(({ kind }) => kind === part);
  const errors = form.formState.errors.question;
  const partField = form.register("question.part", {
    onChange: () => {
      form.setValue("question.itemId", "");
      form.setValue("question.replacesId", "");
    },
  });
  return (
    <Form onSubmit={form.handleSubmit((values) => start.mutate(values))}>
      <div className="field-columns">
        <SelectField label="Part" {...partField}>
          <option value="motor">motor</option>
          <option value="driver">driver</option>
        </SelectField>
        <SelectField
          label="To be fitted"
          error={errors?.itemId?.message}
          {...form.register("question.itemId")}
        >
          <option value="">choose one</option>
          <Items items={offered} />
        </SelectField>
        <SelectField
          label="In place of"
          error={errors?.replacesId?.message}
          {...form.register("question.replacesId")}
        >
          <option value="">every {part}</option>
          <Items items={offered} />
        </SelectField>
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
          Rehearse the swap
        </Button>
      </div>
    </Form>
  );
}

function Items({ items }: { readonly items: readonly ItemChoice[] }) {
  return items.map(({ id, code, name, retired }) => (
    <option key={id} value={id}>
      {code} {name}
      {retired ? " (retired)" : ""}
    </option>
  ));
}
