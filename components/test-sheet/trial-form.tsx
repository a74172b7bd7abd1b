"use client";

import { useState } from "react";
import { HEAT_PLACE_WORDS, HEAT_PLACES, type TestPlan, type Trial } from "@/lib/domain/test-sheets";
import { formatNumber } from "@/lib/domain/units";
import { lostStepsOf } from "@/lib/review/sheet-result";
import { Form } from "@/components/forms/form";
import { useAwake } from "@/components/forms/submit-button";
import { readDecimal } from "@/components/implementation/read-decimal";
import { Button } from "@/components/ui/button";
import { SelectField, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { lostStepWords } from "./lost-step-words";
import {
  afterEntry,
  keepTyped,
  keptTyped,
  NOTHING_TYPED,
  readEntry,
  windingByResistance,
  type TypedEntry,
} from "./typed-entry";

export interface TrialFormProps {
  readonly sheetId: string;
  readonly plan: TestPlan;
  /** Rung of the next trial; null on other sheets. */
  readonly rung: number | null;
  readonly onEnter: (entry: Omit<Trial, "id" | "doneAt">) => void;
}

/** One entry: how far the axis stood off, temperatures, and the outcome as two large buttons. */
export function TrialForm({ sheetId, plan, rung, onEnter }: TrialFormProps) {
  const [typed, setTyped] = useKeptTyped(sheetId);
  const [trouble, setTrouble] = useState<string | null>(null);
  const set = (part: Partial<TypedEntry>): void => setTyped({ ...typed, ...part });
  const enter = (result: Trial["result"]): void => {
    const read = readEntry(typed, plan);
    setTrouble(read.ok ? null : read.trouble);
    if (!read.ok) return;
    onEnter({ ...read.entry, rung, result });
    setTyped(afterEntry(typed));
  };
  const heat = plan.heat !== null;
  return (
    <Form
      onSubmit={async (event) => {
        event.preventDefault();
        if (heat) enter(null);
      }}
    >
      {!heat && <DeviationFields typed={typed} plan={plan} onChange={set} />}
      {heat ? (
        <TemperatureFields typed={typed} onChange={set} withMinutes />
      ) : (
        <details>
          <summary>Temperatures and a note</summary>
          <TemperatureFields typed={typed} onChange={set} />
        </details>
      )}
      {trouble !== null && (
        <Notice title="Not entered" live="alert">
          {trouble}
        </Notice>
      )}
      {heat ? (
        <div className="outcome-buttons">
          <Button type="submit" variant="primary">
            Keep this reading
          </Button>
        </div>
      ) : (
        <div className="outcome-buttons">
          <Button onClick={() => enter("pass")}>Passed: kept step</Button>
          <Button onClick={() => enter("fail")}>Failed: lost steps</Button>
        </div>
      )}
    </Form>
  );
}

/** What was typed outlives a reload: the device's copy stands until something is typed on this page. */
function useKeptTyped(sheetId: string) {
  const [typed, setTyped] = useState<TypedEntry | null>(null);
  const awake = useAwake();
  const kept = typed === null && awake ? keptTyped(sheetId) : null;
  const keep = (next: TypedEntry): void => {
    setTyped(next);
    keepTyped(sheetId, next);
  };
  return [typed ?? kept ?? NOTHING_TYPED, keep] as const;
}

interface FieldsProps {
  readonly typed: TypedEntry;
  readonly onChange: (part: Partial<TypedEntry>) => void;
}

function DeviationFields({ typed, plan, onChange }: FieldsProps & { readonly plan: TestPlan }) {
  const travel = plan.axisKind === "rotary" ? "deg" : "mm";
  const value = readDecimal(typed.deviation);
  const lost = value === null ? null : lostStepsOf(plan, { deviation: { value, unit: typed.unit } });
  return (
    <>
      <div className="field-columns">
        <TextField
          label="Off after the reference run by"
          inputMode="decimal"
          optional
          value={typed.deviation}
          onChange={(event) => onChange({ deviation: event.target.value })}
        />
        <SelectField
          label="Read in"
          value={typed.unit}
          onChange={(event) => onChange({ unit: event.target.value === travel ? travel : "full steps" })}
        >
          <option value="full steps">full steps</option>
          <option value={travel}>{travel}</option>
        </SelectField>
      </div>
      <p className="quiet" role="status">
        {lost !== null && lostStepWords(lost)}
        {lost === null && value !== null && "The travel of a full step is not known, so this stays as it is."}
      </p>
    </>
  );
}

function TemperatureFields({
  typed,
  onChange,
  withMinutes = false,
}: FieldsProps & { readonly withMinutes?: boolean }) {
  const winding = windingByResistance(typed);
  const number = (name: "ambient" | "minutes" | "cold" | "coldAt" | "hot", label: string, unit: string) => (
    <TextField
      label={label}
      unit={unit}
      inputMode="decimal"
      optional
      value={typed[name]}
      onChange={(event) => onChange({ [name]: event.target.value })}
    />
  );
  return (
    <>
      <div className="field-columns">
        {withMinutes && number("minutes", "Since the current came on", "min")}
        {number("ambient", "Ambient", "°C")}
        {HEAT_PLACES.map((place) => (
          <TextField
            key={place}
            label={`${HEAT_PLACE_WORDS[place].charAt(0).toUpperCase()}${HEAT_PLACE_WORDS[place].slice(1)}`}
            unit="°C"
            inputMode="decimal"
            optional
            value={typed.celsius[place]}
            onChange={(event) => onChange({ celsius: { ...typed.celsius, [place]: event.target.value } })}
          />
        ))}
      </div>
      <details>
        <summary>Winding by its resistance</summary>
        <div className="field-columns">
          {number("cold", "Resistance cold", "Ω")}
          {number("coldAt", "at a winding temperature of", "°C")}
          {number("hot", "Resistance hot, soon after switching off", "Ω")}
        </div>
        {winding !== null && (
          <p role="status">The winding is at {formatNumber(winding)} °C, by the resistance of copper.</p>
        )}
      </details>
      <TextField
        label="Note"
        optional
        maxLength={500}
        value={typed.note}
        onChange={(event) => onChange({ note: event.target.value })}
      />
    </>
  );
}
