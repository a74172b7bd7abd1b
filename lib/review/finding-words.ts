import type { Finding } from "@/lib/domain/findings";
import { ruleTitle } from "@/lib/rules/titles";
import { axisWord } from "./axis-word";

type Told = Pick<Finding, "axis" | "ruleId" | "sentence">;

/** What a finding is about: "X axis, temperature of the mount"; of the machine as a whole "Bus voltage". */
export function findingSubject({ axis, ruleId }: Omit<Told, "sentence">): string {
  const title = ruleTitle(ruleId);
  return axis === null ? title : `${axisWord(axis)} axis, ${title.charAt(0).toLowerCase()}${title.slice(1)}`;
}

/** A finding where it stands alone, without a table or a heading that names its axis and its check. */
export function findingWords(finding: Told): string {
  return `${findingSubject(finding)}. ${finding.sentence}`;
}
