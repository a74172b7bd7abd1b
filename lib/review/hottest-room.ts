import type { Assembly } from "@/lib/domain/assembly";
import type { HottestRoom } from "@/lib/domain/rehearsals";
import { RULES } from "@/lib/rules/table";
import type { RuleContext, RuleInput } from "@/lib/rules/types";
import { ruleContext } from "@/lib/rules/view";

/** The coldest and the hottest room that is looked at, °C. */
export const COLDEST_ROOM = -40;
export const HOTTEST_ROOM = 120;
/** The answer is good to this, K, on the safe side. */
const STEP = 0.1;

const WITH_AMBIENT = RULES.filter(({ needs }) => needs.includes("machine.ambient_c"));

interface RoomVerdict {
  readonly over: readonly Check[];
  readonly judged: number;
  readonly needs: readonly string[];
}

interface Check {
  readonly ruleId: string;
  readonly axis: string | null;
}

/**
 * The assembly in a room of that ambient temperature, °C. Where the motors stand in air of their own, the difference
 * between it and the room stays.
 */
export function inRoom(assembly: Assembly, ambientC: number): Assembly {
  const { ambient_c: room, motor_ambient_c: motors } = assembly;
  const apart = room === undefined || motors === undefined ? null : motors - room;
  const own = motors === undefined ? {} : { motor_ambient_c: ambientC + (apart ?? 0) };
  return { ...assembly, ambient_c: ambientC, ...own };
}

/**
 * The hottest room, °C, in which no check that depends on the ambient temperature is over limit, found by bisection
 * and rounded down to 0.1 K, with the check that limits it. Every one of these checks only gets graver as the room gets
 * warmer, which is what the bisection rests on. Checks that are over limit even in the coldest room do not limit it and
 * are named apart; the data that other checks lack are named too, for nothing unknown is good.
 */
export function hottestRoom(input: RuleInput): HottestRoom {
  const coldest = verdictAt(input, COLDEST_ROOM);
  const always = new Set(coldest.over.map(keyOf));
  const shared = { alwaysOver: [...coldest.over], needs: [...coldest.needs] };
  if (coldest.judged === 0) return { ...shared, kind: "cannot", ambientC: null, limitedBy: null };
  const limits = (ambient: number): Check | undefined =>
    verdictAt(input, ambient).over.find((check) => !always.has(keyOf(check)));
  const first = limits(HOTTEST_ROOM);
  if (!first) return { ...shared, kind: "any", ambientC: HOTTEST_ROOM, limitedBy: null };
  let limitedBy = first;
  let good = 0;
  let bad = Math.round((HOTTEST_ROOM - COLDEST_ROOM) / STEP);
  while (bad - good > 1) {
    const middle = Math.floor((good + bad) / 2);
    const found = limits(COLDEST_ROOM + middle * STEP);
    if (found) [bad, limitedBy] = [middle, found];
    else good = middle;
  }
  const ambientC = Math.round((COLDEST_ROOM + good * STEP) * 10) / 10;
  return { ...shared, kind: "limited", ambientC, limitedBy };
}

function verdictAt({ assembly, ...input }: RuleInput, ambientC: number): RoomVerdict {
  const context: RuleContext = ruleContext({ ...input, assembly: inRoom(assembly, ambientC) });
  const over: Check[] = [];
  const needs = new Set<string>();
  let judged = 0;
  for (const rule of WITH_AMBIENT)
    for (const { axis, assessment } of rule.judge(context)) {
      if (!assessment.ok) {
        for (const need of assessment.needs) needs.add(need);
        continue;
      }
      judged += 1;
      if (assessment.level === "over") over.push({ ruleId: rule.id, axis });
    }
  return { over, judged, needs: [...needs] };
}

function keyOf({ ruleId, axis }: Check): string {
  return `${ruleId}|${axis ?? ""}`;
}
