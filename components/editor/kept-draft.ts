/** What was typed and not saved, kept in this browser so that a reload loses nothing. */
export interface KeptDraft {
  readonly files: readonly { readonly path: string; readonly text: string }[];
  readonly fields: Readonly<Record<string, unknown>>;
  readonly at: string;
}

const keyOf = (place: string): string => `keepstep.draft.${place}`;

export function keepDraft(place: string, draft: KeptDraft): void {
  try {
    localStorage.setItem(keyOf(place), JSON.stringify(draft));
  } catch {
    // A browser without room keeps nothing; the text is still on the page.
  }
}

export function forgetDraft(place: string): void {
  try {
    localStorage.removeItem(keyOf(place));
  } catch {
    // As above.
  }
}

/** The draft left behind, or null; one that cannot be read counts as none. */
export function keptDraft(place: string): KeptDraft | null {
  try {
    const kept = JSON.parse(localStorage.getItem(keyOf(place)) ?? "null") as KeptDraft | null;
    return kept && Array.isArray(kept.files) && typeof kept.at === "string" ? kept : null;
  } catch {
    return null;
  }
}
