export interface RevisionMarkProps {
  readonly letter: string;
  /** Where the letter leads, e.g. "#revision-A". */
  readonly href?: string | undefined;
}

/** A revision letter in a triangle: the same at a line, its parameter, its effects and its comments. */
export function RevisionMark({ letter, href }: RevisionMarkProps) {
  const half = letter.length > 1 ? 16 : 12;
  const drawing = (
    <svg width={2 * half} height="21" viewBox={`0 0 ${2 * half} 21`} aria-hidden="true">
      <path d={`M${half} 1.5L${2 * half - 1} 20H1Z`} />
      <text x={half} y="17.2" textAnchor="middle">
        {letter}
      </text>
    </svg>
  );
  const spoken = <span className="visually-hidden">revision {letter}</span>;
  if (href === undefined)
    return (
      <span className="revision-mark">
        {drawing}
        {spoken}
      </span>
    );
  return (
    <a className="revision-mark" href={href}>
      {drawing}
      {spoken}
    </a>
  );
}

/** Several letters side by side; nothing for none. */
export function RevisionMarks({ letters }: { readonly letters: readonly string[] }) {
  if (letters.length === 0) return null;
  return (
    <span className="revision-marks">
      {letters.map((letter) => (
        <RevisionMark key={letter} letter={letter} />
      ))}
    </span>
  );
}
