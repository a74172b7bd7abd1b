export function readArguments(
  words: readonly string[],
  known: Readonly<Record<string, "text" | "flag">>,
): Record<string, string | true>;
export function chooseParts(text: string | undefined, known: readonly string[]): string[];
