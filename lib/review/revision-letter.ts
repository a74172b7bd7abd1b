const LETTERS = 26;

/** Revision letter of the change at `index` (from 0): A … Z, AA, AB … */
export function revisionLetter(index: number): string {
  const last = String.fromCharCode(65 + (index % LETTERS));
  return index < LETTERS ? last : revisionLetter(Math.floor(index / LETTERS) - 1) + last;
}
