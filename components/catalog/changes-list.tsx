import type { FieldChange } from "./item-changes";

/** What a version changed, a line each: was struck, to be beside it. */
export function ChangesList({ changes }: { readonly changes: readonly FieldChange[] }) {
  if (changes.length === 0) return <span className="quiet">no value changed</span>;
  return (
    <ul>
      {changes.map(({ label, was, toBe }) => (
        <li key={label}>
          {label}: <del>{was}</del> <ins>{toBe}</ins>
        </li>
      ))}
    </ul>
  );
}
