import { CHANGE_STATE_WORDS, CHANGE_STATES } from "@/lib/domain/change-states";
import { Button } from "@/components/ui/button";
import { SelectField, TextField } from "@/components/ui/field";

export interface ChangesFilterProps {
  readonly typed: Readonly<Record<string, string>>;
  readonly errors: Readonly<Record<string, string>>;
  readonly models: readonly { readonly id: string; readonly name: string }[];
}

/** A plain form, so that a filter can be kept and sent as an address. */
export function ChangesFilter({ typed, errors, models }: ChangesFilterProps) {
  return (
    <search>
      <form method="get" className="field-columns">
        <TextField
          label="Number or words of the title"
          name="q"
          type="search"
          maxLength={200}
          defaultValue={typed.q ?? ""}
          error={errors.q}
        />
        <SelectField label="State" name="state" defaultValue={typed.state ?? ""} error={errors.state}>
          <option value="">all states</option>
          {CHANGE_STATES.map((state) => (
            <option key={state} value={state}>
              {CHANGE_STATE_WORDS[state]}
            </option>
          ))}
        </SelectField>
        <SelectField
          label="Machine model"
          name="modelId"
          defaultValue={typed.modelId ?? ""}
          error={errors.modelId}
        >
          <option value="">all models</option>
          {models.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </SelectField>
        {typed.machineId ? <input type="hidden" name="machineId" value={typed.machineId} /> : null}
        <div className="acts items-end pb-4">
          <Button type="submit">Show these</Button>
        </div>
      </form>
    </search>
  );
}
