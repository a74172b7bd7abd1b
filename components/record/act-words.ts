/** The nouns that acts begin with, where the word itself would mislead. */
const NOUNS: Readonly<Record<string, string>> = {
  catalog: "hardware",
  model: "machine model",
  key_table: "key table",
};

const spaced = (word: string) => word.replaceAll("_", " ");

/** An act as people read it: "change.taken_back" is "Change taken back". */
export function actWords(action: string): string {
  const [noun = "", ...verbs] = action.split(".");
  const words = `${NOUNS[noun] ?? spaced(noun)} ${verbs.map(spaced).join(" ")}`.trim();
  return words.charAt(0).toUpperCase() + words.slice(1);
}

const PAGES: Readonly<Record<string, string>> = {
  machine: "/machines/",
  change: "/changes/",
  reading: "/readings/",
  person: "/settings/people/",
  site: "/settings/sites/",
  machine_model: "/catalog/models/",
  test_sheet: "/test-sheets/",
  rehearsal: "/rehearsals/",
};

interface Recorded {
  readonly objectType: string;
  readonly objectId: string;
  readonly machineId: string | null;
  readonly changeId: string | null;
}

/** The page of what an act was about; null where it has none. */
export function objectHref({ objectType, objectId, machineId, changeId }: Recorded): string | null {
  const page = PAGES[objectType];
  if (page !== undefined) return `${page}${objectId}`;
  if (objectType === "policy") return "/settings/policy";
  if (objectType === "token") return "/settings/tokens";
  if (changeId !== null) return `/changes/${changeId}`;
  return machineId === null ? null : `/machines/${machineId}`;
}
