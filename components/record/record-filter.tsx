import { Button, ButtonLink } from "@/components/ui/button";
import { SelectField, TextField } from "@/components/ui/field";

export interface RecordFilterProps {
  readonly typed: Readonly<Record<string, string>>;
  readonly errors: Readonly<Record<string, string>>;
}

/** Kinds of acts, as the beginnings of their names. */
const KINDS: readonly (readonly [string, string])[] = [
  ["change.", "Changes"],
  ["reading.", "Readings"],
  ["verification.", "Verifications"],
  ["machine.", "Machines"],
  ["model.", "Machine models"],
  ["catalog.", "Hardware"],
  ["key_table.", "Key tables"],
  ["site.", "Sites"],
  ["policy.", "Policy"],
  ["person.", "People"],
  ["token.", "Tokens"],
  ["session.", "Signing in and out"],
];

/** What is looked for in the record; a plain form, so that a search can be kept and sent as an address. */
export function RecordFilter({ typed, errors }: RecordFilterProps) {
  return (
    <form method="get" role="search" aria-label="Search the record">
      <div className="field-columns">
        <TextField
          label="Words"
          name="q"
          type="search"
          defaultValue={typed.q ?? ""}
          error={errors.q}
          help="A name, a serial number, an act, a reason; beginnings of words will do."
        />
        <TextField label="Who" name="actor" defaultValue={typed.actor ?? ""} error={errors.actor} />
        <SelectField label="Acts on" name="action" defaultValue={typed.action ?? ""} error={errors.action}>
          <option value="">everything</option>
          {KINDS.map(([value, label]) => (
            <option key={value} value={value}>
              {label}
            </option>
          ))}
        </SelectField>
        <TextField
          label="From"
          name="from"
          type="date"
          unit="UTC"
          defaultValue={typed.from ?? ""}
          error={errors.from}
        />
        <TextField
          label="To"
          name="to"
          type="date"
          unit="UTC"
          defaultValue={typed.to ?? ""}
          error={errors.to}
        />
      </div>
      {["machineId", "changeId", "objectType", "objectId"].map((name) =>
        typed[name] ? <input key={name} type="hidden" name={name} value={typed[name]} /> : null,
      )}
      <div className="acts">
        <Button type="submit" variant="primary">
          Search
        </Button>
        <ButtonLink href="/record">Show everything</ButtonLink>
      </div>
    </form>
  );
}
