"use client";

import { CHANGE_CLASS_WORDS, CHANGE_CLASSES, type ChangeClass } from "@/lib/domain/change-states";
import { SelectField, TextArea, TextField } from "@/components/ui/field";
import { EffectivityField } from "./effectivity-field";
import type { ProposalFields, ProposalStartData } from "./proposal-types";

export interface ProposalDetailsProps {
  readonly start: ProposalStartData;
  readonly fields: ProposalFields;
  readonly errors: Readonly<Record<string, string>>;
  readonly editing: boolean;
  readonly onChange: (fields: ProposalFields) => void;
}

/** Title, reason, class and effectivity of a change. */
export function ProposalDetails({ start, fields, errors, editing, onChange }: ProposalDetailsProps) {
  const set = (part: Partial<ProposalFields>): void => onChange({ ...fields, ...part });
  return (
    <>
      <TextField
        label="Title"
        required
        maxLength={160}
        value={fields.title}
        error={errors.title}
        onChange={(event) => set({ title: event.target.value })}
      />
      <TextArea
        label="Reason"
        required
        rows={3}
        maxLength={4000}
        value={fields.reason}
        error={errors.reason}
        onChange={(event) => set({ reason: event.target.value })}
      />
      <div className="field-columns">
        <SelectField
          label="Class"
          value={fields.class}
          error={errors.class}
          onChange={(event) => set({ class: event.target.value as ChangeClass })}
        >
          {CHANGE_CLASSES.map((value) => (
            <option key={value} value={value}>
              {CHANGE_CLASS_WORDS[value]}
            </option>
          ))}
        </SelectField>
        {start.machine ? (
          <TextField
            label={`Permitted on ${start.machine.serial} until`}
            type="date"
            required
            value={fields.deviationUntil}
            error={errors.deviationUntil}
            help="The last day. From the next day on the machine requires its baseline again."
            onChange={(event) => set({ deviationUntil: event.target.value })}
          />
        ) : (
          <EffectivityField
            modelName={start.model.name}
            sites={start.sites}
            machines={start.machines}
            value={fields.effectivity}
            error={errors.effectivity}
            onChange={(effectivity) => set({ effectivity })}
          />
        )}
      </div>
      {editing && (
        <TextField
          label="Note for the new version"
          optional
          maxLength={1000}
          value={fields.note}
          help="What is different from the version before, for those who read both."
          onChange={(event) => set({ note: event.target.value })}
        />
      )}
    </>
  );
}
