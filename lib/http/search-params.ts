import "server-only";
import type { z } from "zod";
import { pointerOf } from "./problem";

export type SearchParams = Promise<Record<string, string | string[] | undefined>>;

export interface ReadParams<T> {
  /** What counts: entries that do not fit are left out. */
  readonly query: T;
  /** As typed, one text a name. */
  readonly typed: Readonly<Record<string, string>>;
  /** A sentence for each entry that does not fit. */
  readonly errors: Readonly<Record<string, string>>;
}

/** Reads the query of a page's address; what does not fit is said beside its field and not searched for. */
export async function readParams<S extends z.ZodObject>(
  schema: S,
  searchParams: SearchParams,
): Promise<ReadParams<z.output<S>>> {
  const given = Object.entries(await searchParams).flatMap(([name, value]) => {
    const text = Array.isArray(value) ? value[0] : value;
    return text === undefined || text === "" ? [] : [[name, text] as const];
  });
  const typed: Record<string, string> = Object.fromEntries(given);
  const read = schema.safeParse(typed);
  if (read.success) return { query: read.data, typed, errors: {} };
  const errors = Object.fromEntries(
    read.error.issues.map((issue) => [pointerOf(issue.path).slice(1), issue.message]),
  );
  const fitting = Object.fromEntries(given.filter(([name]) => !(name in errors)));
  return { query: schema.parse(fitting), typed, errors };
}
