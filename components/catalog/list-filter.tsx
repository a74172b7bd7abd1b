import { Button } from "@/components/ui/button";
import { SelectField, TextField } from "@/components/ui/field";

/** Looks for a part of a code or name, in use or retired; works without script. */
export function ListFilter({ q, retired }: { readonly q: string; readonly retired: string }) {
  return (
    <search>
      <form method="get" className="field-columns">
        <TextField label="Part of a code or name" name="q" type="search" defaultValue={q} maxLength={200} />
        <SelectField label="Show" name="retired" defaultValue={retired}>
          <option value="no">in use</option>
          <option value="yes">retired</option>
          <option value="all">both</option>
        </SelectField>
        <div className="acts items-end pb-4">
          <Button type="submit">Show these</Button>
        </div>
      </form>
    </search>
  );
}
