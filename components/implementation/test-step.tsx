"use client";

import { useRef, useState } from "react";
import type { MeasuredTemperature } from "@/lib/domain/changes";
import { MAX_ATTACHMENT_BYTES } from "@/lib/schemas/changes";
import { apiCall, fieldErrors } from "@/components/api";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { newActKey, toBase64 } from "@/components/readings/read-files";
import { Button } from "@/components/ui/button";
import { SelectField, TextArea, TextField } from "@/components/ui/field";
import { FileDrop } from "@/components/ui/file-drop";
import { Notice } from "@/components/ui/notice";
import { readDecimal } from "./read-decimal";
import { Temperatures, type TypedTemperature } from "./temperatures";

export interface TestStepProps {
  readonly changeId: string;
  readonly machineId: string;
  readonly axes: readonly string[];
  readonly hasReadBack: boolean;
}

interface Answer {
  readonly machineVerified: boolean;
  readonly missing: string | null;
}

interface Typed {
  readonly tested: string;
  readonly result: "pass" | "fail";
  readonly ambient: string;
  readonly temperatures: readonly TypedTemperature[];
  readonly note: string;
  readonly statement: string;
}

const NOTHING: Typed = { tested: "", result: "pass", ambient: "", temperatures: [], note: "", statement: "" };

/** What cannot be sent as typed; null where everything can. */
function trouble({ ambient, temperatures }: Typed, files: readonly File[]): string | null {
  const numbers = [ambient, ...temperatures.map(({ celsius }) => celsius)].filter(
    (text) => text.trim() !== "",
  );
  const bad = numbers.find((text) => readDecimal(text) === null);
  if (bad !== undefined) return `“${bad}” is not a temperature. Write digits, such as 61 or 61.5.`;
  const large = files.find(({ size }) => size > MAX_ATTACHMENT_BYTES);
  return large ? `${large.name} is larger than 10 MB. Nothing was sent; take a smaller copy.` : null;
}

async function requestOf(typed: Typed, files: readonly File[], machineId: string) {
  const temperatures = typed.temperatures.flatMap(({ axis, place, celsius }): MeasuredTemperature[] => {
    const value = readDecimal(celsius);
    return value === null ? [] : [{ axis: axis === "" ? null : axis, place, celsius: value }];
  });
  const attachments = await Promise.all(
    files.map(async (file) => ({
      name: file.name,
      mediaType: file.type || "application/octet-stream",
      base64: await toBase64(file),
    })),
  );
  const { tested, result, note } = typed;
  const statement = typed.statement.trim() === "" ? null : typed.statement;
  return {
    machineId,
    tested,
    result,
    note,
    statement,
    ambientC: readDecimal(typed.ambient),
    temperatures,
    attachments,
  };
}

/** Records the test on the machine; what is then still missing is said at once. */
export function TestStep({ changeId, machineId, axes, hasReadBack }: TestStepProps) {
  const [typed, setTyped] = useState(NOTHING);
  const [files, setFiles] = useState<File[]>([]);
  const [wrong, setWrong] = useState<string | null>(null);
  const key = useRef(newActKey());
  const set = (part: Partial<Typed>): void => setTyped({ ...typed, ...part });
  const save = useSave({
    send: async () => {
      const body = await requestOf(typed, files, machineId);
      return apiCall<Answer>("POST", `/changes/${changeId}/verifications`, {
        body,
        idempotencyKey: key.current,
      });
    },
    onSaved: () => {
      key.current = newActKey();
      setTyped(NOTHING);
      setFiles([]);
    },
  });
  const errors = fieldErrors(save.error);
  return (
    <Form
      onSubmit={async (event) => {
        event.preventDefault();
        const found = trouble(typed, files);
        setWrong(found);
        if (found === null) save.mutate(undefined);
      }}
    >
      <TextArea
        label="What was tested, and how"
        rows={3}
        maxLength={4000}
        value={typed.tested}
        error={errors.tested}
        help="For example: out and back to the reference ten times at full speed, steps counted."
        onChange={(event) => set({ tested: event.target.value })}
      />
      <div className="field-columns">
        <SelectField
          label="Result"
          value={typed.result}
          onChange={(event) => set({ result: event.target.value === "fail" ? "fail" : "pass" })}
        >
          <option value="pass">passed</option>
          <option value="fail">failed</option>
        </SelectField>
        <TextField
          label="Ambient"
          unit="°C"
          inputMode="decimal"
          optional
          value={typed.ambient}
          onChange={(event) => set({ ambient: event.target.value })}
        />
      </div>
      <Temperatures
        axes={axes}
        value={typed.temperatures}
        onChange={(temperatures) => set({ temperatures })}
      />
      {!hasReadBack && (
        <TextArea
          label="Statement: this model gives nothing back to read"
          rows={2}
          maxLength={1000}
          value={typed.statement}
          help="State that you applied the downloaded text to this machine, unchanged. It is kept with your name."
          onChange={(event) => set({ statement: event.target.value })}
        />
      )}
      <TextField
        label="Note"
        optional
        value={typed.note}
        onChange={(event) => set({ note: event.target.value })}
      />
      <FileDrop
        label="Photo or log"
        files={files}
        onChange={setFiles}
        multiple
        help="May stay empty; 10 MB each at most."
        error={wrong ?? undefined}
      />
      <Refusal error={save.error} title="Not recorded" />
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Record the test
        </Button>
      </div>
      {save.data && (
        <Notice live="status" title={save.data.machineVerified ? "Verified on this machine" : "Recorded"}>
          <p>{save.data.missing ?? "Nothing is missing."}</p>
        </Notice>
      )}
    </Form>
  );
}
