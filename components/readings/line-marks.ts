import type { Finding } from "@/lib/domain/findings";
import { gravest, type Level } from "@/lib/domain/levels";
import { parameterKey } from "@/lib/review/axis-word";
import type { LineMark } from "@/components/revision/marked-text";

/** The marks of one file: a line that a finding other than *within limits* rests on. */
export function lineMarks(findings: readonly Finding[], path: string): LineMark[] {
  return findings
    .filter(({ level }) => level !== "within")
    .flatMap(({ level, sentence, spans }) =>
      spans.filter((span) => span.path === path).map(({ line }) => ({ line, level, sentence })),
    );
}

/** The gravest level of the findings that rest on a parameter, by `parameterKey`. */
export function parameterLevels(findings: readonly Finding[]): Record<string, Level> {
  const levels = new Map<string, Level>();
  for (const { axis, parameters, level } of findings)
    for (const parameter of parameters) {
      const key = parameterKey({ axis, parameter });
      levels.set(key, gravest([level, levels.get(key) ?? "within"]));
    }
  return Object.fromEntries(levels);
}
