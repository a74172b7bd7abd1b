import Link from "next/link";
import { STANDING_WORDS, STANDINGS } from "@/lib/domain/floor";
import type { Floor } from "@/lib/schemas/floor";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";

type Typed = Readonly<Record<string, string>>;

interface Choice {
  readonly value: string;
  readonly words: string;
  readonly machines?: number;
}

/** The address of the floor with one entry of its filter set or taken out; the page starts anew. */
function address(typed: Typed, name: string, value: string): string {
  const kept = Object.entries(typed).filter(([key]) => key !== name && key !== "page");
  const query = new URLSearchParams(value === "" ? kept : [...kept, [name, value]]).toString();
  return query === "" ? "/floor" : `/floor?${query}`;
}

interface LineProps {
  readonly label: string;
  readonly name: string;
  readonly all: string;
  readonly choices: readonly Choice[];
  readonly typed: Typed;
}

function Line({ label, name, all, choices, typed }: LineProps) {
  const chosen = typed[name] ?? "";
  return (
    <li className="flex flex-wrap items-baseline gap-x-4 gap-y-1">
      <span className="quiet">{label}</span>
      {[{ value: "", words: all }, ...choices].map(({ value, words, machines }: Choice) => (
        <span key={value} className="whitespace-nowrap">
          {value === chosen ? (
            <strong aria-current="true">{words}</strong>
          ) : (
            <Link href={address(typed, name, value)}>{words}</Link>
          )}
          {machines !== undefined && <span className="quiet">{`\u00a0${machines}`}</span>}
        </span>
      ))}
    </li>
  );
}

export interface FloorFilterProps {
  readonly floor: Pick<Floor, "sites" | "models">;
  readonly typed: Typed;
  readonly errors: Typed;
}

/** Which machines are shown: by site, model and standing in plain words, by serial number, and on which day. */
export function FloorFilter({ floor, typed, errors }: FloorFilterProps) {
  const named = (choices: Floor["sites"]): Choice[] =>
    choices.map(({ id, name, machines }) => ({ value: id, words: name, machines }));
  return (
    <search className="mb-4 block">
      <ul aria-label="Filter">
        <Line label="Site" name="siteId" all="all sites" choices={named(floor.sites)} typed={typed} />
        <Line label="Model" name="modelId" all="all models" choices={named(floor.models)} typed={typed} />
        {!typed.on && (
          <Line
            label="Standing"
            name="level"
            all="every standing"
            choices={STANDINGS.map((standing) => ({ value: standing, words: STANDING_WORDS[standing] }))}
            typed={typed}
          />
        )}
      </ul>
      <details className="mt-1" open={Boolean(typed.q ?? typed.on)}>
        <summary>Serial number, or another day</summary>
        <form method="get" action="/floor" className="field-columns">
          {["siteId", "modelId"].map((name) =>
            typed[name] ? <input key={name} type="hidden" name={name} value={typed[name]} /> : null,
          )}
          <TextField
            label="Part of a serial number"
            name="q"
            type="search"
            maxLength={80}
            defaultValue={typed.q ?? ""}
            error={errors.q}
          />
          <TextField
            label="As of the end of"
            name="on"
            type="date"
            unit="UTC"
            defaultValue={typed.on ?? ""}
            error={errors.on}
            help="What was in force on that day; 100 machines a page."
          />
          <div className="acts items-end pb-4">
            <Button type="submit">Show these</Button>
          </div>
        </form>
      </details>
    </search>
  );
}
