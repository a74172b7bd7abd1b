import Link from "next/link";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";

export interface DayChoiceProps {
  /** Address of the page without a query. */
  readonly path: string;
  readonly day: string;
  readonly error?: string | undefined;
}

/** The same sheet as of the end of another day; a plain form, so that it works as an address. */
export function DayChoice({ path, day, error }: DayChoiceProps) {
  return (
    <details open={day !== ""}>
      <summary>As of another day</summary>
      <form method="get" action={path} className="field-columns">
        <TextField
          label="As of the end of"
          name="on"
          type="date"
          unit="UTC"
          defaultValue={day}
          help="What was required and what had been read by then."
          error={error}
        />
        <div className="acts items-end pb-4">
          <Button type="submit">Show that day</Button>
          {day !== "" && <Link href={path}>Show now</Link>}
        </div>
      </form>
    </details>
  );
}
