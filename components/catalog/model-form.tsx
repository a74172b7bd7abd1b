"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { useFieldArray, useForm, useWatch } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { CheckboxField, FieldGroup, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { SheetSection } from "@/components/ui/sheet";
import { plural } from "@/lib/domain/sentences";
import type { ItemChoice } from "@/lib/schemas/catalog";
import type { ModelView } from "@/lib/schemas/machine-models";
import {
  axisFormValues,
  modelFormSchema,
  modelFormValues,
  type AxisFormValues,
  type ModelInForm,
} from "@/lib/schemas/model-form";
import { AxisFields, type ModelForm } from "./axis-fields";
import { ItemSelect } from "./item-select";
import { SaveTrouble } from "./save-trouble";
import { errorAt } from "./schema-form";
import { showFieldErrors, useSave } from "./use-save";
import { registered } from "./registered";

export interface ModelFormProps {
  /** Null: a new model. */
  readonly model:
    (ModelInForm & { readonly id: string; readonly version: number; readonly machines: number }) | null;
  readonly choices: readonly ItemChoice[];
}

/** A machine model, new or as its next version. */
export function ModelFormSheet({ model, choices }: ModelFormProps) {
  const router = useRouter();
  const form = useForm({ resolver: zodResolver(modelFormSchema), values: modelFormValues(model) });
  const save = useSave<ModelView>({
    onSaved: (saved) => (model ? router.refresh() : router.push(`/catalog/models/${saved.id}`)),
  });
  const submit = form.handleSubmit(({ code, ...typed }) =>
    save.mutate(
      model
        ? { method: "PUT", path: `/machine-models/${model.id}`, body: typed, ifMatch: model.version }
        : { method: "POST", path: "/machine-models", body: { code, ...typed } },
      { onError: (error) => showFieldErrors(error, form.setError) },
    ),
  );
  return (
    <form onSubmit={(event) => void submit(event)} noValidate>
      <MachineFields form={form} choices={choices} isNew={model === null} />
      <AxesFields form={form} choices={choices} />
      <SaveTrouble error={save.error} onLoad={save.reset} />
      {save.isSuccess && model && (
        <Notice live="status">
          <p>
            Saved as version {save.data.version}.{" "}
            {model.machines > 0
              ? `${plural(model.machines, "machine")} of this model will be checked again.`
              : "No machine of this model is in the fleet yet."}
          </p>
        </Notice>
      )}
      <div className="acts mt-4">
        <Button type="submit" variant="primary" busy={save.isPending}>
          {model ? `Save as version ${model.version + 1}` : "Make the machine model"}
        </Button>
      </div>
    </form>
  );
}

interface PartProps {
  readonly form: ModelForm;
  readonly choices: readonly ItemChoice[];
}

function MachineFields({ form, choices, isNew }: PartProps & { readonly isNew: boolean }) {
  const hardware = useWatch({ control: form.control, name: "hardware" });
  const error = (field: string) => errorAt(form.formState.errors, field);
  return (
    <FieldGroup legend="The machine">
      {isNew && (
        <TextField
          label="Code"
          help="Short, as on drawings and labels; it stays."
          error={error("code")}
          maxLength={40}
          {...registered(form, "code")}
        />
      )}
      <TextField label="Name" error={error("name")} maxLength={200} {...registered(form, "name")} />
      {(["supply", "controller_board"] as const).map((part) => (
        <ItemSelect
          key={part}
          kind={part}
          choices={choices}
          chosen={hardware[part]}
          error={error(`hardware.${part}`)}
          {...registered(form, `hardware.${part}`)}
        />
      ))}
      <TextField
        label="Rise inside the enclosure"
        unit="K"
        help="How much warmer it is around the drivers than in the room. Empty: no rise is reckoned with, and findings say so."
        inputMode="decimal"
        autoComplete="off"
        error={error("hardware.enclosure_rise_k")}
        {...registered(form, "hardware.enclosure_rise_k")}
      />
      <CheckboxField
        label="Machines of this model can read back what they run or have stored"
        help="Without it, a technician signs a statement in place of the read-back."
        defaultChecked={form.getValues("hardware.has_read_back")}
        {...form.register("hardware.has_read_back")}
      />
    </FieldGroup>
  );
}

function AxesFields({ form, choices }: PartProps) {
  const { fields, append, remove, move, insert } = useFieldArray({
    control: form.control,
    name: "hardware.axes",
  });
  const [removed, setRemoved] = useState<{ index: number; axis: AxisFormValues } | null>(null);
  const takeOut = (index: number): void => {
    setRemoved({ index, axis: form.getValues(`hardware.axes.${index}`) });
    remove(index);
  };
  const error = errorAt(form.formState.errors, "hardware.axes.root");
  return (
    <SheetSection title="Axes" note="Their order is the order of values in a list of a text.">
      {fields.map(({ id }, index) => (
        <AxisFields
          key={id}
          form={form}
          index={index}
          count={fields.length}
          choices={choices}
          onMove={(by) => move(index, index + by)}
          onRemove={() => takeOut(index)}
        />
      ))}
      {error && <p className="field-error">{error}</p>}
      {removed && (
        <Notice
          live="status"
          acts={
            <Button
              onClick={() => {
                insert(removed.index, removed.axis);
                setRemoved(null);
              }}
            >
              Put it back
            </Button>
          }
        >
          <p>Axis {removed.axis.axis || removed.index + 1} is taken out. It is gone once you save.</p>
        </Notice>
      )}
      <div className="acts mb-6">
        <Button onClick={() => append(axisFormValues())}>Add an axis</Button>
      </div>
    </SheetSection>
  );
}
