import { RULES } from "./table";

const TITLES: ReadonlyMap<string, string> = new Map(RULES.map(({ id, title }) => [id, title]));

/** The name of a check; its id where this release no longer has it. */
export function ruleTitle(id: string): string {
  return TITLES.get(id) ?? id;
}
