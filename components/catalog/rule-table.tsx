"use client";

import { Button } from "@/components/ui/button";
import { Head, Table } from "@/components/ui/table";
import { needsBasis, parameterDefinition, PARAMETERS, parameterNameSchema } from "@/lib/domain/parameters";
import { LAYERS, LAYER_WORDS } from "@/lib/domain/readings";
import { rowTrouble, unitChoices, withParameter, type RuleRow } from "./rule-rows";

export interface RuleTableProps {
  readonly rows: readonly RuleRow[];
  /** Names of the model's axes. */
  readonly axes: readonly string[];
  readonly readOnly: boolean;
  readonly onChange: (row: RuleRow) => void;
  readonly onRemove: (row: RuleRow) => void;
}

/** Which key is which parameter, a row each. */
export function RuleTable({ rows, ...rest }: RuleTableProps) {
  return (
    <Table caption="Key table" captionHidden>
      <thead>
        <tr>
          <Head>Key</Head>
          <Head>Parameter</Head>
          <Head>Axis</Head>
          <Head>Unit</Head>
          <Head>Peak or rms</Head>
          <Head>Layer</Head>
          {!rest.readOnly && <td />}
        </tr>
      </thead>
      <tbody>
        {rows.map((row, index) => (
          <Row key={row.id} row={row} number={index + 1} {...rest} />
        ))}
      </tbody>
    </Table>
  );
}

type RowProps = Omit<RuleTableProps, "rows"> & { readonly row: RuleRow; readonly number: number };

function Row({ row, number, axes, readOnly, onChange, onRemove }: RowProps) {
  const trouble = rowTrouble(row);
  const troubleId = `row-${row.id}-trouble`;
  const entry = (field: keyof RuleRow, words: string) => ({
    className: "entry",
    "aria-label": `${words}, row ${number}`,
    disabled: readOnly,
    "aria-invalid": trouble?.field === field || undefined,
    "aria-describedby": trouble?.field === field ? troubleId : undefined,
  });
  const machineWide = parameterDefinition(row.parameter).scope === "machine";
  const units = unitChoices(row.parameter);
  return (
    <tr>
      <td className="min-w-56">
        <input
          {...entry("key", "Key")}
          className="entry entry-code"
          spellCheck={false}
          autoCapitalize="off"
          autoComplete="off"
          maxLength={200}
          value={row.key}
          onChange={(event) => onChange({ ...row, key: event.target.value })}
        />
        {trouble && row.key !== "" && (
          <p className="field-error" id={troubleId}>
            {trouble.sentence}
          </p>
        )}
      </td>
      <td className="min-w-44">
        <select
          {...entry("parameter", "Parameter")}
          value={row.parameter}
          onChange={(event) => onChange(withParameter(row, parameterNameSchema.parse(event.target.value)))}
        >
          {PARAMETERS.map(({ name, label }) => (
            <option key={name} value={name}>
              {label}
            </option>
          ))}
        </select>
      </td>
      <Choice
        {...entry("axis", "Axis")}
        value={row.axis}
        none={machineWide ? "machine" : row.key.includes("{axis}") ? "every axis" : "say which"}
        options={machineWide ? [] : axes}
        onPick={(axis) => onChange({ ...row, axis })}
      />
      <Choice
        {...entry("unit", "Unit")}
        value={row.unit}
        none={units.length === 0 ? "none" : "as in the text"}
        options={units}
        onPick={(unit) => onChange({ ...row, unit })}
      />
      <Choice
        {...entry("basis", "Peak or rms")}
        value={row.basis}
        none={needsBasis(row.parameter) ? "not said" : "–"}
        options={needsBasis(row.parameter) ? ["peak", "rms"] : []}
        onPick={(basis) => onChange({ ...row, basis })}
      />
      <Choice
        {...entry("layer", "Layer")}
        value={row.layer}
        none="every layer"
        options={LAYERS}
        words={LAYER_WORDS}
        onPick={(layer) => onChange({ ...row, layer })}
      />
      {!readOnly && (
        <td>
          <Button variant="quiet" onClick={() => onRemove(row)} aria-label={`Remove row ${number}`}>
            remove
          </Button>
        </td>
      )}
    </tr>
  );
}

interface ChoiceProps extends Omit<React.ComponentProps<"select">, "onChange"> {
  readonly none: string;
  readonly options: readonly string[];
  readonly words?: Readonly<Record<string, string>>;
  readonly onPick: (value: string) => void;
}

/** A choice in a cell; a stored value that is no longer offered stays in sight. */
function Choice({ none, options, words, onPick, ...select }: ChoiceProps) {
  const value = String(select.value);
  const offered = value === "" || options.includes(value) ? options : [...options, value];
  return (
    <td className="min-w-28">
      <select {...select} onChange={(event) => onPick(event.target.value)}>
        <option value="">{none}</option>
        {offered.map((option) => (
          <option key={option} value={option}>
            {words?.[option] ?? option}
          </option>
        ))}
      </select>
    </td>
  );
}
