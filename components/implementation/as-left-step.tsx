"use client";

import { useRef, useState } from "react";
import { LAYER_WORDS, LAYERS, type Layer } from "@/lib/domain/readings";
import type { CreatedReading } from "@/lib/schemas/readings";
import { apiCall, fieldErrors } from "@/components/api";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { filesTrouble, newActKey, sentTexts } from "@/components/readings/read-files";
import { Button } from "@/components/ui/button";
import { SelectField, TextArea, TextField } from "@/components/ui/field";
import { FileDrop } from "@/components/ui/file-drop";
import { Notice } from "@/components/ui/notice";

export interface AsLeftStepProps {
  readonly machineId: string;
  readonly serial: string;
  readonly hasReadBack: boolean;
}

/** Takes the as-left text of the machine and says at once whether it is as required. */
export function AsLeftStep({ machineId, serial, hasReadBack }: AsLeftStepProps) {
  const [files, setFiles] = useState<File[]>([]);
  const [pasted, setPasted] = useState("");
  const [layer, setLayer] = useState<Layer>(hasReadBack ? "stored" : "file");
  const [plate, setPlate] = useState("");
  const [trouble, setTrouble] = useState<string | null>(null);
  const key = useRef(newActKey());
  const save = useSave({
    send: async () => {
      const sent = await sentTexts(files, { path: "", text: pasted });
      const body = { kind: "as_left", layer, readAt: new Date().toISOString(), serial: plate, files: sent };
      return apiCall<CreatedReading>("POST", `/machines/${machineId}/readings`, {
        body,
        idempotencyKey: key.current,
      });
    },
    onSaved: () => {
      key.current = newActKey();
      setFiles([]);
      setPasted("");
    },
  });
  const errors = fieldErrors(save.error);
  return (
    <Form
      onSubmit={async (event) => {
        event.preventDefault();
        const found = filesTrouble(files, { path: "", text: pasted });
        setTrouble(found);
        if (found === null) save.mutate(undefined);
      }}
    >
      <TextField
        label="Serial number off the plate"
        autoCapitalize="characters"
        autoComplete="off"
        value={plate}
        error={errors.serial}
        help={`It proves that the read-back is of ${serial} and of no other machine.`}
        onChange={(event) => setPlate(event.target.value)}
      />
      <SelectField label="Layer" value={layer} onChange={(event) => setLayer(event.target.value as Layer)}>
        {LAYERS.map((value) => (
          <option key={value} value={value}>
            {LAYER_WORDS[value]}
          </option>
        ))}
      </SelectField>
      <FileDrop
        label="As-left text"
        files={files}
        onChange={setFiles}
        multiple
        error={trouble ?? undefined}
      />
      <details>
        <summary>Paste the text</summary>
        <TextArea
          label="Text"
          code
          rows={8}
          value={pasted}
          onChange={(event) => setPasted(event.target.value)}
        />
      </details>
      <Refusal error={save.error} title="Not kept" />
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Keep the as-left reading
        </Button>
      </div>
      {save.data && (
        <Notice live="status" title={`Kept for ${save.data.serial}`}>
          <p>{save.data.step?.missing ?? "It reads back what is required."}</p>
        </Notice>
      )}
    </Form>
  );
}
