interface Page {
  readonly page: number;
  readonly pageSize: number;
  readonly total: number;
}

/** The addresses and the summary for a Pager: the same page with another number of its query. */
export function pageLinks(
  { page, pageSize, total }: Page,
  { path, query, what }: { path: string; query: Readonly<Record<string, string>>; what: string },
): { summary: string; previousHref: string | null; nextHref: string | null } {
  const address = (number: number): string => {
    const kept = Object.entries(query).filter(([name, value]) => name !== "page" && value !== "");
    return `${path}?${new URLSearchParams([...kept, ["page", String(number)]]).toString()}`;
  };
  const first = (page - 1) * pageSize + 1;
  const last = Math.min(page * pageSize, total);
  const shown = first > last ? "none" : `${first} to ${last}`;
  return {
    summary: total === 0 ? `No ${what}` : `${shown} of ${total} ${what}`,
    previousHref: page > 1 ? address(page - 1) : null,
    nextHref: last < total ? address(page + 1) : null,
  };
}
