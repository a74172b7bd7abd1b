"use client";

import { useRouter } from "next/navigation";
import { useRef, useState } from "react";
import { parameterLabel } from "@/lib/domain/parameters";
import { isLadder, LADDER_PARAMETERS, TEST_WORDS, type Test, type TestPlan } from "@/lib/domain/test-sheets";
import { formatNumber, shownUnit } from "@/lib/domain/units";
import type { SheetView } from "@/lib/schemas/test-sheets";
import { apiCall, fieldErrors } from "@/components/api";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { readDecimal } from "@/components/implementation/read-decimal";
import { newActKey } from "@/components/readings/read-files";
import { Button } from "@/components/ui/button";
import { SelectField, TextField } from "@/components/ui/field";

export interface StartFormProps {
  readonly machineId: string;
  readonly axis: string;
  readonly test: Test;
  readonly changeId: string | null;
  /** Null: start and step have to be given. */
  readonly plan: TestPlan | null;
  /** Inside unit of the ladder's setting. */
  readonly unit: string;
}

const RELIABILITIES = [0.9, 0.95, 0.99];

/** Starts a test sheet; start and step stand as predicted and may be changed before. */
export function StartForm({ machineId, axis, test, changeId, plan, unit }: StartFormProps) {
  const router = useRouter();
  const shown = shownUnit(unit);
  const ladder = plan?.ladder ?? null;
  const written = (value: number | undefined) =>
    value === undefined ? "" : formatNumber(value * shown.factor, 6);
  const [start, setStart] = useState(written(ladder?.start));
  const [step, setStep] = useState(written(ladder?.step));
  const [reliability, setReliability] = useState(0.9);
  const [repeatability, setRepeatability] = useState("");
  const key = useRef(newActKey());
  const inside = (text: string, was: number | undefined): number | null => {
    // Untouched numbers stay as exact as they were predicted.
    if (text === written(was)) return null;
    const value = readDecimal(text);
    return value === null ? null : value / shown.factor;
  };
  const save = useSave({
    send: () =>
      apiCall<SheetView>("POST", "/test-sheets", {
        body: {
          machineId,
          axis,
          test,
          changeId,
          start: inside(start, ladder?.start),
          step: inside(step, ladder?.step),
          reliability,
          repeatability: readDecimal(repeatability),
        },
        idempotencyKey: key.current,
      }),
    onSaved: ({ id }) => router.push(`/test-sheets/${id}`),
  });
  const errors = fieldErrors(save.error);
  return (
    <Form
      onSubmit={async (event) => {
        event.preventDefault();
        save.mutate(undefined);
      }}
    >
      <div className="field-columns">
        {isLadder(test) && (
          <>
            <TextField
              label={`Start, ${parameterLabel(LADDER_PARAMETERS[test].parameter).toLowerCase()}`}
              unit={shown.unit}
              inputMode="decimal"
              value={start}
              error={errors.start}
              onChange={(event) => setStart(event.target.value)}
            />
            <TextField
              label="Step"
              unit={shown.unit}
              inputMode="decimal"
              value={step}
              error={errors.step}
              help="About what the boundary scatters by from trial to trial."
              onChange={(event) => setStep(event.target.value)}
            />
          </>
        )}
        {TEST_WORDS[test].kind === "run" && (
          <SelectField
            label="Share that must succeed, at 95 % confidence"
            value={reliability}
            onChange={(event) => setReliability(Number(event.target.value))}
          >
            {RELIABILITIES.map((share) => (
              <option key={share} value={share}>
                {formatNumber(share * 100)} %
              </option>
            ))}
          </SelectField>
        )}
        {TEST_WORDS[test].kind !== "heat" && (
          <TextField
            label="What the reference repeats to"
            unit="full steps"
            inputMode="decimal"
            optional
            value={repeatability}
            error={errors.repeatability}
            help="Run the reference five times without a move between; half of the spread read."
            onChange={(event) => setRepeatability(event.target.value)}
          />
        )}
      </div>
      <Refusal error={save.error} title="Not started" />
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Start the test sheet
        </Button>
      </div>
    </Form>
  );
}
