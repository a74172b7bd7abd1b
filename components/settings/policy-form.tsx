"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { apiCall } from "@/components/api";
import { Done } from "@/components/forms/done";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import { CheckboxField, FieldGroup, TextField } from "@/components/ui/field";
import { savePolicySchema, type PolicyVersionView } from "@/lib/schemas/policies";
import { typedNumber } from "@/lib/schemas/typed-field";
import { POLICY_WORDS, shownShare, storedShare, type PolicyField } from "./policy-words";

const { shape } = savePolicySchema.shape.policy;
const percent = (schema: z.ZodType<number, number>) =>
  typedNumber(z.number("Type a number in %.").transform(storedShare).pipe(schema));

const typedSchema = z.object({
  torque_margin_below_limit_speed: percent(shape.torque_margin_below_limit_speed),
  torque_margin_above_limit_speed: percent(shape.torque_margin_above_limit_speed),
  junction_limit_c: typedNumber(shape.junction_limit_c),
  stale_after_days: typedNumber(shape.stale_after_days),
  counter_weight_current: typedNumber(shape.counter_weight_current),
  counter_weight_speed: typedNumber(shape.counter_weight_speed),
  counter_weight_acceleration: typedNumber(shape.counter_weight_acceleration),
  counter_weight_corner_speed: typedNumber(shape.counter_weight_corner_speed),
  counter_least_share: percent(shape.counter_least_share),
  counter_raises_current: shape.counter_raises_current,
  note: savePolicySchema.shape.note,
});
type Typed = z.input<typeof typedSchema>;
type Sent = z.output<typeof typedSchema>;

export function PolicyForm({ current }: { readonly current: PolicyVersionView }) {
  const { policy, version } = current;
  const form = useForm<Typed, unknown, Sent>({
    resolver: zodResolver(typedSchema),
    defaultValues: {
      torque_margin_below_limit_speed: String(shownShare(policy.torque_margin_below_limit_speed)),
      torque_margin_above_limit_speed: String(shownShare(policy.torque_margin_above_limit_speed)),
      junction_limit_c: String(policy.junction_limit_c),
      stale_after_days: String(policy.stale_after_days),
      counter_weight_current: String(policy.counter_weight_current),
      counter_weight_speed: String(policy.counter_weight_speed),
      counter_weight_acceleration: String(policy.counter_weight_acceleration),
      counter_weight_corner_speed: String(policy.counter_weight_corner_speed),
      counter_least_share: String(shownShare(policy.counter_least_share)),
      counter_raises_current: policy.counter_raises_current,
      note: "",
    },
  });
  const save = useSave({
    form,
    send: ({ note, ...values }: Sent) =>
      apiCall<PolicyVersionView>("POST", "/policies", { body: { policy: values, note }, ifMatch: version }),
    onSaved: () => form.resetField("note"),
  });
  const { errors } = form.formState;
  const field = (name: PolicyField) => (
    <TextField
      key={name}
      label={POLICY_WORDS[name].label}
      unit={POLICY_WORDS[name].unit}
      help={POLICY_WORDS[name].help}
      inputMode="decimal"
      autoComplete="off"
      error={errors[name]?.message}
      {...form.register(name)}
    />
  );
  return (
    <Form onSubmit={form.handleSubmit((values) => save.mutate(values))}>
      <FieldGroup legend="Margins">
        {field("torque_margin_below_limit_speed")}
        {field("torque_margin_above_limit_speed")}
        {field("junction_limit_c")}
        {field("stale_after_days")}
      </FieldGroup>
      <FieldGroup legend="Counter-proposals">
        {field("counter_weight_current")}
        {field("counter_weight_speed")}
        {field("counter_weight_acceleration")}
        {field("counter_weight_corner_speed")}
        {field("counter_least_share")}
        <CheckboxField
          label={POLICY_WORDS.counter_raises_current.label}
          help={POLICY_WORDS.counter_raises_current.help}
          {...form.register("counter_raises_current")}
        />
      </FieldGroup>
      <TextField
        label="Reason"
        help="Kept with the version and in the record."
        error={errors.note?.message}
        {...form.register("note")}
      />
      <Refusal error={save.error} title="Not saved" />
      {save.data && (
        <Done>
          <p>Version {save.data.version} stands. The fleet is being checked again.</p>
        </Done>
      )}
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Save as a new version
        </Button>
      </div>
    </Form>
  );
}
