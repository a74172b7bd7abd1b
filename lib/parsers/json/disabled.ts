import type { NameAt, ScalarAt } from "../tree";
import { scalarOf, TOKEN, tokensOf } from "./tokens";

export interface DisabledMember {
  readonly name: NameAt;
  readonly at: ScalarAt;
}

/** The members that a comment holds when it holds nothing else: `"run_ma": 800, "hold_ma": 400`. */
export function disabledMembers(text: string, from: number, to: number): DisabledMember[] {
  const content = text.slice(from, to);
  if (!content.includes(":")) return [];
  const members: DisabledMember[] = [];
  let part = 0;
  let name: NameAt | null = null;
  for (const token of tokensOf(content)) {
    if (token.kind === TOKEN.blank || token.kind === TOKEN.lineBreak) continue;
    if (token.faulty || !fits(part, token.kind)) return [];
    const start = from + token.start;
    const end = from + token.end;
    if (part === 0) name = { name: token.value, start, end };
    if (part === 2 && name) members.push({ name, at: { start, end, value: scalarOf(token) } });
    part = (part + 1) % PARTS.length;
  }
  return part === 0 || part === PARTS.length - 1 ? members : [];
}

const VALUES: readonly number[] = [TOKEN.null, TOKEN.true, TOKEN.false, TOKEN.string, TOKEN.number];
/** Name, colon, value, comma. */
const PARTS: readonly (readonly number[])[] = [[TOKEN.string], [TOKEN.colon], VALUES, [TOKEN.comma]];

function fits(part: number, kind: number): boolean {
  return PARTS[part]?.includes(kind) ?? false;
}
