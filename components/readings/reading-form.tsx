"use client";

import { useMutation } from "@tanstack/react-query";
import { useRef, useState } from "react";
import { useForm } from "react-hook-form";
import type { CreatedReading } from "@/lib/schemas/readings";
import { apiCall, fieldErrors } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { Button } from "@/components/ui/button";
import { RadioField, SelectField, TextArea, TextField } from "@/components/ui/field";
import { FileDrop } from "@/components/ui/file-drop";
import { CheckOutcome, type CheckAnswerData } from "./check-outcome";
import { MachineChoice, type ChosenMachine } from "./machine-choice";
import { filesTrouble, newActKey, sentTexts, type SentText } from "./read-files";
import { KindAndLayer, ReadingDetails, type ReadingValues } from "./reading-fields";
import { ReadingOutcome } from "./reading-outcome";

export interface ReadingFormProps {
  readonly machine: ChosenMachine | null;
  /** Models to check against where no machine is chosen. */
  readonly models: readonly { readonly id: string; readonly name: string }[];
  readonly mayKeep: boolean;
  readonly mayMap: boolean;
  /** Starts with the mode that keeps nothing. */
  readonly startWithCheck: boolean;
  /** Formats that texts are read in. */
  readonly formats: readonly string[];
}

type Outcome =
  | { readonly kind: "kept"; readonly kept: CreatedReading }
  | {
      readonly kind: "checked";
      readonly answer: CheckAnswerData;
      readonly files: readonly SentText[];
      readonly modelId: string;
    };

const EMPTY: ReadingValues = {
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

const FIELDS = ["serial", "readAt", "firmwareVersion", "note"] as const;

/** Adds a reading of a machine, or checks a text without keeping it; made for a phone beside the machine. */
export function ReadingForm(props: ReadingFormProps) {
  const { models, mayKeep, mayMap, formats } = props;
  const [machine, setMachine] = useState(props.machine);
  const [modelId, setModelId] = useState("");
  const [files, setFiles] = useState<File[]>([]);
  const [mode, setMode] = useState<"keep" | "check">(mayKeep && !props.startWithCheck ? "keep" : "check");
  const [trouble, setTrouble] = useState<{ machine?: string; files?: string }>({});
  const form = useForm<ReadingValues>({ defaultValues: EMPTY });
  const key = useRef<string | null>(null);

  const send = useMutation({
    mutationFn: async (values: ReadingValues): Promise<Outcome> => {
      const sent = await sentTexts(files, { path: values.pastedPath, text: values.pasted });
      const body = { files: sent, format: values.format, layer: values.layer };
      if (mode === "check") {
        const place = machine ? { machineId: machine.id } : { machineModelId: modelId };
        const answer = await apiCall<CheckAnswerData>("POST", "/check", { body: { ...body, ...place } });
        return { kind: "checked", answer, files: sent, modelId: machine?.modelId ?? modelId };
      }
      key.current ??= newActKey();
      const kept = await apiCall<CreatedReading>("POST", `/machines/${machine?.id ?? ""}/readings`, {
        body: { ...body, ...saidOf(values) },
        idempotencyKey: key.current,
      });
      return { kind: "kept", kept };
    },
    onError: (error) => {
      // Whether it was stored is known after a refusal, and a corrected reading is another act.
      if (fieldErrors(error) && !isUnreachable(error)) key.current = null;
      const errors = fieldErrors(error);
      for (const field of FIELDS) {
        const message = errors[field];
        if (message !== undefined) form.setError(field, { type: "server", message });
      }
      const ofFiles = Object.entries(errors).find(([name]) => name.startsWith("files"))?.[1];
      if (ofFiles !== undefined) setTrouble({ files: ofFiles });
    },
    onSuccess: () => {
      key.current = null;
    },
  });

  const submit = form.handleSubmit((values) => {
    const ofFiles = filesTrouble(files, { path: values.pastedPath, text: values.pasted });
    const ofMachine =
      machine || (mode === "check" && modelId !== "")
        ? null
        : mode === "keep"
          ? "Choose the machine that was read."
          : "Choose a machine or a machine model to check against.";
    setTrouble({ ...(ofFiles ? { files: ofFiles } : {}), ...(ofMachine ? { machine: ofMachine } : {}) });
    if (!ofFiles && !ofMachine) send.mutate(values);
  });
  const another = (): void => {
    send.reset();
    setFiles([]);
    form.setValue("pasted", "");
  };

  if (send.data?.kind === "kept") return <ReadingOutcome kept={send.data.kept} onAnother={another} />;
  return (
    <>
      <form onSubmit={submit} noValidate>
        {mayKeep && (
          <RadioField
            label="What to do with the text"
            name="mode"
            value={undefined}
            options={[
              { value: "keep", label: "Keep it as a reading" },
              { value: "check", label: "Check it without keeping it" },
            ]}
            onChange={(event) => setMode(event.target.value === "check" ? "check" : "keep")}
            defaultValue={mode}
          />
        )}
        <MachineChoice
          chosen={machine}
          onChoose={setMachine}
          error={trouble.machine}
          optional={mode === "check"}
        />
        {mode === "check" && !machine && (
          <SelectField
            label="Or a machine model"
            value={modelId}
            onChange={(event) => setModelId(event.target.value)}
            help="A model has no site, so what rests on the ambient temperature cannot be checked."
          >
            <option value="">none chosen</option>
            {models.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </SelectField>
        )}
        <FileDrop
          label="Configuration text"
          files={files}
          onChange={setFiles}
          multiple
          error={trouble.files}
          help="One file or several that belong together, 2 MB each at most."
        />
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
        <KindAndLayer form={form} />
        {mode === "keep" && <ReadingDetails form={form} />}
        <Refusal error={send.error} title={mode === "keep" ? "Not kept" : "Not checked"} />
        <div className="acts mt-4">
          <Button type="submit" variant="primary" busy={send.isPending}>
            {mode === "keep" ? "Keep the reading" : "Check the text"}
          </Button>
        </div>
      </form>
      {send.data?.kind === "checked" && (
        <CheckOutcome
          answer={send.data.answer}
          files={send.data.files}
          modelId={send.data.modelId}
          mayMap={mayMap}
          onLearned={() => void submit()}
        />
      )}
    </>
  );
}

function isUnreachable(error: unknown): boolean {
  return error instanceof Error && "code" in error && error.code === "unreachable";
}

function saidOf({ kind, readAt, firmwareVersion, serial, note }: ReadingValues) {
  const moment = readAt === "" ? new Date() : new Date(readAt);
  return {
    kind,
    readAt: moment.toISOString(),
    note,
    ...(firmwareVersion.trim() === "" ? {} : { firmwareVersion }),
    ...(serial.trim() === "" ? {} : { serial }),
  };
}
