"use client";

import { useWatch, type UseFormReturn } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { loadSchema } from "@/lib/domain/assembly";
import { unlockedBy } from "@/lib/rules/unlocks";
import type { ItemChoice } from "@/lib/schemas/catalog";
import { travelField, type ModelFormData, type ModelFormValues } from "@/lib/schemas/model-form";
import { ItemSelect } from "./item-select";
import { errorAt, SchemaForm } from "./schema-form";
import { unlockSentence } from "./unlock-sentence";
import { registered } from "./registered";

export type ModelForm = UseFormReturn<ModelFormValues, unknown, ModelFormData>;

export interface AxisFieldsProps {
  readonly form: ModelForm;
  readonly index: number;
  readonly count: number;
  readonly choices: readonly ItemChoice[];
  readonly onMove: (by: -1 | 1) => void;
  readonly onRemove: () => void;
}

const PARTS = ["motor", "driver", "drive_train", "mount"] as const;

/** One axis of a model between two rules: its hardware, its travel, its load. */
export function AxisFields({ form, index, count, choices, onMove, onRemove }: AxisFieldsProps) {
  const at = `hardware.axes.${index}` as const;
  const axis = useWatch({ control: form.control, name: at });
  const error = (field: string) => errorAt(form.formState.errors, `${at}.${field}`);
  const name = axis.axis.trim() === "" ? `Axis ${index + 1}` : `Axis ${axis.axis}`;
  return (
    <fieldset className="field-group">
      <legend>{name}</legend>
      <div className="field-columns">
        <TextField
          label="Name of the axis"
          help="As the key table and the texts call it; upper and lower case are the same."
          error={error("axis")}
          maxLength={40}
          {...registered(form, `${at}.axis`)}
        />
        <TextField
          label="Motors"
          help="Motors that share the load, each with its own driver."
          error={error("motor_count")}
          inputMode="numeric"
          {...registered(form, `${at}.motor_count`)}
        />
        {PARTS.map((part) => (
          <ItemSelect
            key={part}
            kind={part}
            choices={choices}
            chosen={axis[part]}
            error={error(part)}
            {...registered(form, `${at}.${part}`)}
          />
        ))}
        <TravelFields form={form} index={index} choices={choices} />
        <TextField
          label="Coupled with"
          help="Axes whose motors move together with this one, as with crossed belts; names separated by commas. Each axis counts the same shared motors."
          error={error("coupled_with")}
          {...registered(form, `${at}.coupled_with`)}
        />
      </div>
      <details className="mb-4">
        <summary>Load of {name.toLowerCase()}</summary>
        <div className="pt-4">
          <SchemaForm subject="load" schema={loadSchema} form={form} prefix={`${at}.load`} />
        </div>
      </details>
      <div className="acts">
        <Button disabled={index === 0} onClick={() => onMove(-1)} aria-label={`Move ${name} up`}>
          Up
        </Button>
        <Button disabled={index === count - 1} onClick={() => onMove(1)} aria-label={`Move ${name} down`}>
          Down
        </Button>
        <Button disabled={count === 1} onClick={onRemove} aria-label={`Remove ${name}`}>
          Remove
        </Button>
      </div>
    </fieldset>
  );
}

/** The travel in the unit that the drive train asks for, and one that was filled in the other. */
function TravelFields({ form, index, choices }: Pick<AxisFieldsProps, "form" | "index" | "choices">) {
  const at = `hardware.axes.${index}` as const;
  const axis = useWatch({ control: form.control, name: at });
  const driveTrain = choices.find(({ id }) => id === axis.drive_train);
  const asked = travelField(driveTrain?.driveTrainKind ?? null);
  return (["travel_mm", "travel_deg"] as const)
    .filter((field) => field === asked || axis[field] !== "")
    .map((field) => {
      const unlocks = axis[field] === "" ? unlockSentence(unlockedBy("axis", field)) : null;
      return (
        <TextField
          key={field}
          label="Travel"
          unit={field === "travel_mm" ? "mm" : "deg"}
          inputMode="decimal"
          autoComplete="off"
          error={errorAt(form.formState.errors, `${at}.${field}`)}
          {...(unlocks === null ? {} : { help: unlocks })}
          {...registered(form, `${at}.${field}`)}
        />
      );
    });
}
