import { hasHidden, visibleBlanks, visibleRuns } from "./visible-characters";

export interface CodeTextProps {
  readonly text: string;
  /** Draws blanks and tabs as marks. */
  readonly blanks?: boolean | undefined;
}

/** Part of a configuration text; hidden and reordering characters are drawn by their code point. */
export function CodeText({ text, blanks = false }: CodeTextProps) {
  const plain = (words: string): string => (blanks ? visibleBlanks(words) : words);
  if (!hasHidden(text)) return <>{plain(text)}</>;
  return (
    <>
      {visibleRuns(text).map((run, index) =>
        run.kind === "plain" ? (
          plain(run.text)
        ) : (
          <span key={index} className="hidden-character" title={run.name}>
            {run.codePoint}
            <span className="visually-hidden">, {run.name}</span>
          </span>
        ),
      )}
    </>
  );
}
