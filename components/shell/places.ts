export interface Place {
  readonly label: string;
  readonly href: string;
}

/** Along the top strip, in the order of Alt+Shift+1 … 6. */
export const PLACES: readonly Place[] = [
  { label: "Floor", href: "/floor" },
  { label: "Readings", href: "/readings" },
  { label: "Changes", href: "/changes" },
  { label: "Catalog", href: "/catalog" },
  { label: "Checks", href: "/checks" },
  { label: "Record", href: "/record" },
];

/** The technician's three, at the bottom of a phone. */
export const PHONE_PLACES: readonly Place[] = [
  { label: "Floor", href: "/floor" },
  { label: "Add a reading", href: "/readings/new" },
  { label: "Work", href: "/work" },
];

/** Machines are reached from the floor, so a machine's page lights up Floor; a rehearsal is of the whole floor. */
const WITHIN: Readonly<Record<string, string>> = { "/machines": "/floor", "/rehearsals": "/floor" };

/** The place that a path belongs to: the longest one that leads to it; null for none. */
export function placeOf(path: string, places: readonly Place[]): Place | null {
  const from = Object.entries(WITHIN).find(([prefix]) => leadsTo(prefix, path));
  const sought = from ? from[1] : path;
  const leading = places.filter((place) => leadsTo(place.href, sought));
  return leading.sort((a, b) => b.href.length - a.href.length)[0] ?? null;
}

function leadsTo(prefix: string, path: string): boolean {
  return path === prefix || path.startsWith(`${prefix}/`);
}
