import type { UseFormRegisterReturn } from "react-hook-form";
import { SelectField } from "@/components/ui/field";

export interface NamedChoice {
  readonly id: string;
  readonly name: string;
}

export interface FleetChoiceProps {
  readonly sites: readonly NamedChoice[];
  readonly models: readonly NamedChoice[];
  readonly site: UseFormRegisterReturn;
  readonly model: UseFormRegisterReturn;
}

/** Which machines a rehearsal goes through. */
export function FleetChoice({ sites, models, site, model }: FleetChoiceProps) {
  return (
    <>
      <SelectField label="Site" {...site}>
        <option value="">all sites</option>
        {sites.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </SelectField>
      <SelectField label="Machine model" {...model}>
        <option value="">all models</option>
        {models.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </SelectField>
    </>
  );
}
