"use client";

import type { MeasuredTemperature } from "@/lib/domain/changes";
import { Button } from "@/components/ui/button";
import { FieldGroup, SelectField, TextField } from "@/components/ui/field";

export interface TypedTemperature {
  /** Axis name; empty: of the machine. */
  readonly axis: string;
  readonly place: MeasuredTemperature["place"];
  readonly celsius: string;
}

const PLACES: readonly { value: MeasuredTemperature["place"]; label: string }[] = [
  { value: "case", label: "motor case" },
  { value: "winding", label: "winding" },
  { value: "driver", label: "driver" },
  { value: "mount", label: "mount" },
];

export interface TemperaturesProps {
  readonly axes: readonly string[];
  readonly value: readonly TypedTemperature[];
  readonly onChange: (value: readonly TypedTemperature[]) => void;
}

/** Measured temperatures, as many as there are. */
export function Temperatures({ axes, value, onChange }: TemperaturesProps) {
  const put = (at: number, part: Partial<TypedTemperature>): void =>
    onChange(value.map((row, index) => (index === at ? { ...row, ...part } : row)));
  return (
    <>
      {value.map(({ axis, place, celsius }, index) => (
        <FieldGroup key={index} legend={`Temperature ${index + 1}`}>
          <SelectField
            label="Axis"
            value={axis}
            onChange={(event) => put(index, { axis: event.target.value })}
          >
            {axes.map((name) => (
              <option key={name} value={name}>
                {name.toUpperCase()}
              </option>
            ))}
            <option value="">the machine</option>
          </SelectField>
          <SelectField
            label="Where"
            value={place}
            onChange={(event) =>
              put(index, {
                place: PLACES.find(({ value: one }) => one === event.target.value)?.value ?? "case",
              })
            }
          >
            {PLACES.map(({ value: one, label }) => (
              <option key={one} value={one}>
                {label}
              </option>
            ))}
          </SelectField>
          <TextField
            label="Measured"
            unit="°C"
            help="Standing on run current, settled. A driver that falls back to hold current at standstill must be kept from it."
            inputMode="decimal"
            value={celsius}
            onChange={(event) => put(index, { celsius: event.target.value })}
          />
          <Button variant="quiet" onClick={() => onChange(value.filter((_, at) => at !== index))}>
            leave out
          </Button>
        </FieldGroup>
      ))}
      <Button
        variant="quiet"
        onClick={() => onChange([...value, { axis: axes[0] ?? "", place: "case", celsius: "" }])}
      >
        Add a measured temperature
      </Button>
    </>
  );
}
