"use client";

import type { Effectivity } from "@/lib/domain/changes";
import { plural } from "@/lib/domain/sentences";
import { CheckboxField, FieldGroup, SelectField } from "@/components/ui/field";

export interface EffectivityFieldProps {
  readonly modelName: string;
  readonly sites: readonly { readonly id: string; readonly name: string; readonly machines: number }[];
  readonly machines: readonly { readonly id: string; readonly serial: string; readonly siteName: string }[];
  readonly value: Effectivity;
  readonly onChange: (value: Effectivity) => void;
  readonly error?: string | undefined;
}

/** An effectivity that is being put together: its list may still be empty. */
function chosenIds(value: Effectivity): readonly string[] {
  if (value.kind === "sites") return value.siteIds;
  return value.kind === "machines" ? value.machineIds : [];
}

function ofKind(kind: string, ids: string[]): Effectivity {
  if (kind === "sites") return { kind, siteIds: ids };
  return kind === "machines" ? { kind, machineIds: ids } : { kind: "model" };
}

/** Which machines the change applies to: every one of the model, those of some sites, or some by serial number. */
export function EffectivityField({
  modelName,
  sites,
  machines,
  value,
  onChange,
  error,
}: EffectivityFieldProps) {
  const ids = chosenIds(value);
  const toggle = (id: string): void => {
    onChange(ofKind(value.kind, ids.includes(id) ? ids.filter((one) => one !== id) : [...ids, id]));
  };
  const choices =
    value.kind === "sites"
      ? sites.map(({ id, name, machines: count }) => ({ id, label: `${name}, ${plural(count, "machine")}` }))
      : machines.map(({ id, serial, siteName }) => ({ id, label: `${serial}, ${siteName}` }));
  return (
    <>
      <SelectField
        label="Effectivity"
        value={value.kind}
        error={error}
        onChange={(event) => onChange(ofKind(event.target.value, []))}
      >
        <option value="model">
          every {modelName} in service ({plural(machines.length, "machine")})
        </option>
        <option value="sites">those of some sites</option>
        <option value="machines">some machines</option>
      </SelectField>
      {value.kind !== "model" && (
        <FieldGroup legend={value.kind === "sites" ? "Sites" : "Machines"}>
          {choices.map(({ id, label }) => (
            <CheckboxField key={id} label={label} checked={ids.includes(id)} onChange={() => toggle(id)} />
          ))}
        </FieldGroup>
      )}
    </>
  );
}
