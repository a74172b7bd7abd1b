import { plural } from "@/lib/domain/sentences";

interface Leaf {
  readonly page: number;
  readonly pageSize: number;
  readonly total: number;
}

/** Links and words for leafing through a list whose filters stand in the address. */
export function leafThrough(
  { page, pageSize, total }: Leaf,
  {
    path,
    filters,
    noun,
  }: { path: string; filters: Readonly<Record<string, string | undefined>>; noun: string },
) {
  const href = (to: number): string => {
    const query = new URLSearchParams();
    for (const [name, value] of Object.entries(filters)) if (value) query.set(name, value);
    if (to > 1) query.set("page", String(to));
    return query.size === 0 ? path : `${path}?${query.toString()}`;
  };
  const first = (page - 1) * pageSize + 1;
  const last = Math.min(page * pageSize, total);
  return {
    summary: total > pageSize ? `${first} to ${last} of ${plural(total, noun)}` : plural(total, noun),
    previousHref: page > 1 ? href(page - 1) : null,
    nextHref: last < total ? href(page + 1) : null,
  };
}
