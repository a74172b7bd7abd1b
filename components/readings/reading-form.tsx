"use client";

import { useEffect, useState } from "react";
import { useForm, useWatch } from "react-hook-form";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { Button } from "@/components/ui/button";
import { SelectField } from "@/components/ui/field";
import { FileDrop } from "@/components/ui/file-drop";
import { CheckOutcome } from "./check-outcome";
import { MachineChoice, type ChosenMachine } from "./machine-choice";
import { filesTrouble } from "./read-files";
import { KindAndLayer, ModeChoice, PasteFields, ReadingDetails, type ReadingValues } from "./reading-fields";
import { ReadingOutcome } from "./reading-outcome";
import { useSendReading } from "./use-send-reading";

export interface ReadingFormProps {
  readonly machine: ChosenMachine | null;
  /** Models to check against where no machine is chosen. */
  readonly models: readonly { readonly id: string; readonly name: string }[];
  readonly mayKeep: boolean;
  /** Whether the reader may teach the key table. */
  readonly mayMap: boolean;
  /** Starts with the mode that keeps nothing. */
  readonly startWithCheck: boolean;
  /** Names of the formats that texts are read in. */
  readonly formats: readonly string[];
}

const EMPTY: ReadingValues = {
  mode: "keep",
  kind: "as_found",
  layer: "file",
  readAt: "",
  firmwareVersion: "",
  serial: "",
  note: "",
  format: "auto",
  pastedPath: "",
  pasted: "",
};

interface Trouble {
  readonly machine?: string | undefined;
  readonly files?: string | undefined;
}

function placeTrouble(
  mode: ReadingValues["mode"],
  machine: ChosenMachine | null,
  modelId: string,
): string | undefined {
  if (machine) return undefined;
  if (mode === "keep") return "Choose the machine that was read.";
  return modelId === "" ? "Choose a machine or a machine model to check against." : undefined;
}

/** Adds a reading of a machine, or checks a text without keeping it; made for a phone beside the machine. */
export function ReadingForm({
  models,
  mayKeep,
  mayMap,
  startWithCheck,
  formats,
  ...given
}: ReadingFormProps) {
  const [machine, setMachine] = useState(given.machine);
  const [modelId, setModelId] = useState("");
  const [files, setFiles] = useState<File[]>([]);
  const [trouble, setTrouble] = useState<Trouble>({});
  const form = useForm<ReadingValues>({
    defaultValues: { ...EMPTY, mode: mayKeep && !startWithCheck ? "keep" : "check" },
  });
  const mode = useWatch({ control: form.control, name: "mode" });
  const send = useSendReading({ form, onFileTrouble: (sentence) => setTrouble({ files: sentence }) });
  const submit = form.handleSubmit((values) => {
    const found: Trouble = {
      machine: placeTrouble(values.mode, machine, modelId),
      files: filesTrouble(files, { path: values.pastedPath, text: values.pasted }) ?? undefined,
    };
    setTrouble(found);
    if (!found.machine && !found.files) send.mutate({ values, files, machine, modelId });
  });
  useEffect(() => {
    // What is missing may stand above the window of a phone.
    if (trouble.machine || trouble.files) document.querySelector<HTMLElement>("form [aria-invalid]")?.focus();
  }, [trouble]);
  const another = (): void => {
    send.reset();
    setFiles([]);
    form.setValue("pasted", "");
  };

  if (send.data?.kind === "kept") return <ReadingOutcome kept={send.data.kept} onAnother={another} />;
  return (
    <>
      <Form onSubmit={submit}>
        {mayKeep && <ModeChoice form={form} />}
        <MachineChoice
          chosen={machine}
          onChoose={setMachine}
          error={trouble.machine}
          optional={mode === "check"}
        />
        {mode === "check" && !machine && (
          <ModelChoice models={models} modelId={modelId} onChoose={setModelId} />
        )}
        <FileDrop
          label="Configuration text"
          files={files}
          onChange={setFiles}
          multiple
          error={trouble.files}
          help="One file, or several that belong together; 2 MB each at most."
        />
        <PasteFields form={form} formats={formats} />
        <KindAndLayer form={form} />
        {mode === "keep" && <ReadingDetails form={form} />}
        <Refusal error={send.error} title={mode === "keep" ? "Not kept" : "Not checked"} />
        <div className="acts mt-4">
          <Button type="submit" variant="primary" busy={send.isPending}>
            {mode === "keep" ? "Keep the reading" : "Check the text"}
          </Button>
        </div>
      </Form>
      {send.data?.kind === "checked" && (
        <CheckOutcome {...send.data} mayMap={mayMap} onLearned={() => void submit()} />
      )}
    </>
  );
}

interface ModelChoiceProps {
  readonly models: ReadingFormProps["models"];
  readonly modelId: string;
  readonly onChoose: (id: string) => void;
}

function ModelChoice({ models, modelId, onChoose }: ModelChoiceProps) {
  return (
    <SelectField
      label="Or a machine model"
      value={modelId}
      onChange={(event) => onChoose(event.target.value)}
      help="A model has no site, so what rests on the ambient temperature cannot be checked."
    >
      <option value="">none chosen</option>
      {models.map(({ id, name }) => (
        <option key={id} value={id}>
          {name}
        </option>
      ))}
    </SelectField>
  );
}
