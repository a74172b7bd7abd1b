/** Why a draft that was kept could not be submitted, carried from the editor to the page of its change. */
const keyOf = (changeId: string): string => `keepstep.unsent.${changeId}`;

export function keepUnsent(changeId: string, reason: string): void {
  try {
    sessionStorage.setItem(keyOf(changeId), reason);
  } catch {
    // Without storage the page of the change still shows that it is a draft.
  }
}

export function unsentReason(changeId: string): string | null {
  try {
    return sessionStorage.getItem(keyOf(changeId));
  } catch {
    return null;
  }
}
