import { LAYER_WORDS, LAYERS, READING_KIND_WORDS, READING_KINDS } from "@/lib/domain/readings";
import { Button } from "@/components/ui/button";
import { SelectField, TextField } from "@/components/ui/field";

export interface ReadingsFilterProps {
  readonly typed: Readonly<Record<string, string>>;
  readonly errors: Readonly<Record<string, string>>;
}

/** A plain form, so that a filter can be kept and sent as an address. */
export function ReadingsFilter({ typed, errors }: ReadingsFilterProps) {
  return (
    <search>
      <form method="get" className="field-columns">
        <TextField
          label="Part of a serial number"
          name="q"
          type="search"
          maxLength={80}
          defaultValue={typed.q ?? ""}
          error={errors.q}
        />
        <SelectField label="Kind" name="kind" defaultValue={typed.kind ?? ""} error={errors.kind}>
          <option value="">all kinds</option>
          {READING_KINDS.map((kind) => (
            <option key={kind} value={kind}>
              {READING_KIND_WORDS[kind]}
            </option>
          ))}
        </SelectField>
        <SelectField label="Layer" name="layer" defaultValue={typed.layer ?? ""} error={errors.layer}>
          <option value="">all layers</option>
          {LAYERS.map((layer) => (
            <option key={layer} value={layer}>
              {LAYER_WORDS[layer]}
            </option>
          ))}
        </SelectField>
        {["machineId", "modelId", "siteId"].map((name) =>
          typed[name] ? <input key={name} type="hidden" name={name} value={typed[name]} /> : null,
        )}
        <div className="acts items-end pb-4">
          <Button type="submit">Show these</Button>
        </div>
      </form>
    </search>
  );
}
