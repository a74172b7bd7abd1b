/** An axis as people say it: "X", "Arm"; an empty string for the machine as a whole. */
export function axisWord(axis: string | null): string {
  if (axis === null) return "";
  return axis.length <= 2 ? axis.toUpperCase() : `${axis[0]?.toUpperCase() ?? ""}${axis.slice(1)}`;
}

/** "X torque margin" for an axis, "Supply voltage" for the machine: a sentence begins with either. */
export function onAxis(axis: string | null, words: string): string {
  if (axis === null) return `${words[0]?.toUpperCase() ?? ""}${words.slice(1)}`;
  return `${axisWord(axis)} ${words}`;
}

/** What makes two parameters of two configurations the same parameter; axis names match without regard to case. */
export function parameterKey(place: { readonly axis: string | null; readonly parameter: string }): string {
  return `${place.axis?.toLowerCase() ?? ""}|${place.parameter}`;
}
