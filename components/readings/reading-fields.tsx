"use client";

import type { UseFormReturn } from "react-hook-form";
import { LAYER_WORDS, LAYERS, READING_KIND_WORDS, READING_KINDS } from "@/lib/domain/readings";
import { RadioField, SelectField, TextArea, TextField } from "@/components/ui/field";

/** What is said of a reading beside its files. */
export interface ReadingValues {
  mode: "keep" | "check";
  kind: (typeof READING_KINDS)[number];
  layer: (typeof LAYERS)[number];
  /** As the browser has it: local time without a zone; empty: now. */
  readAt: string;
  firmwareVersion: string;
  serial: string;
  note: string;
  format: string;
  pastedPath: string;
  pasted: string;
}

const KIND_HELP: Record<ReadingValues["kind"], string> = {
  as_found: "before work on the machine",
  as_left: "after work on it",
  in_service: "a routine report",
};

const LAYER_HELP: Record<ReadingValues["layer"], string> = {
  file: "what the firmware was built or started from",
  stored: "what the controller keeps; it beats the file",
  running: "read back from the running firmware; it beats both",
};

interface FieldsProps {
  readonly form: UseFormReturn<ReadingValues>;
}

export function ModeChoice({ form }: FieldsProps) {
  return (
    <RadioField
      label="What to do with the text"
      {...form.register("mode")}
      options={[
        { value: "keep", label: "Keep it as a reading" },
        { value: "check", label: "Check it without keeping it" },
      ]}
    />
  );
}

export function PasteFields({ form, formats }: FieldsProps & { readonly formats: readonly string[] }) {
  return (
    <details className="mb-4">
      <summary>Paste the text, or say its format</summary>
      <TextArea label="Text" code rows={10} {...form.register("pasted")} />
      <div className="field-columns">
        <TextField
          label="Name of the pasted text"
          placeholder="pasted.conf"
          optional
          {...form.register("pastedPath")}
        />
        <SelectField label="Format" {...form.register("format")}>
          <option value="auto">recognised from the text</option>
          {formats.map((name) => (
            <option key={name} value={name}>
              {name}
            </option>
          ))}
        </SelectField>
      </div>
    </details>
  );
}

export function KindAndLayer({ form }: FieldsProps) {
  return (
    <div className="field-columns">
      <RadioField
        label="Kind"
        {...form.register("kind")}
        options={READING_KINDS.map((value) => ({
          value,
          label: READING_KIND_WORDS[value],
          help: KIND_HELP[value],
        }))}
      />
      <RadioField
        label="Layer"
        {...form.register("layer")}
        options={LAYERS.map((value) => ({ value, label: LAYER_WORDS[value], help: LAYER_HELP[value] }))}
      />
    </div>
  );
}

export function ReadingDetails({ form }: FieldsProps) {
  const { errors } = form.formState;
  return (
    <div className="field-columns">
      <TextField
        label="Serial number off the plate"
        autoCapitalize="characters"
        autoComplete="off"
        optional
        help="Typed as it stands on the machine; it guards against the wrong machine."
        error={errors.serial?.message}
        {...form.register("serial")}
      />
      <TextField
        label="Read at"
        type="datetime-local"
        optional
        help="Your local time; empty means now."
        error={errors.readAt?.message}
        {...form.register("readAt")}
      />
      <TextField
        label="Firmware version"
        autoComplete="off"
        optional
        help="Another version than before expires all earlier readings."
        error={errors.firmwareVersion?.message}
        {...form.register("firmwareVersion")}
      />
      <TextField label="Note" optional error={errors.note?.message} {...form.register("note")} />
    </div>
  );
}
