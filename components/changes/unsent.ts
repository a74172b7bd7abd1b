/** Why a draft that was kept could not be submitted, carried from the editor to the page of its change. */
const keyOf = (changeId: string): string => `keepstep.unsent.${changeId}`;

export function keepUnsent(changeId: string, reason: string): void {
  try {
    sessionStorage.setItem(keyOf(changeId), reason);
  } catch {
    // Without storage the page of the change still shows that it is a draft.
  }
}

/** The reason, once: reading it forgets it. */
export function takeUnsent(changeId: string): string | null {
  try {
    const reason = sessionStorage.getItem(keyOf(changeId));
    sessionStorage.removeItem(keyOf(changeId));
    return reason;
  } catch {
    return null;
  }
}
