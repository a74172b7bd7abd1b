import type { ParameterValue } from "@/lib/domain/values";
import { RULES } from "@/lib/rules/table";
import type { RuleInput } from "@/lib/rules/types";
import { ruleContext } from "@/lib/rules/view";
import { placeKey, type CheckPlace } from "./types";

/** What a check says of one state of the values, without its words. */
export interface Standing extends CheckPlace {
  /** Null: it cannot be checked. */
  readonly over: boolean | null;
  readonly margin: number | null;
}

/** What every check says of the values, by `placeKey`. */
export function standings(
  input: RuleInput,
  parameters: readonly ParameterValue[],
): ReadonlyMap<string, Standing> {
  const context = ruleContext({ ...input, parameters });
  return new Map(
    RULES.flatMap((rule) =>
      rule.judge(context).map(({ axis, assessment }): [string, Standing] => {
        const place = { ruleId: rule.id, axis };
        const found = assessment.ok
          ? { ...place, over: assessment.level === "over", margin: assessment.margin }
          : { ...place, over: null, margin: null };
        return [placeKey(place), found];
      }),
    ),
  );
}

/** The checks over limit, by `placeKey`. */
export function overLimit(
  input: RuleInput,
  parameters: readonly ParameterValue[],
): ReadonlyMap<string, CheckPlace> {
  const over = [...standings(input, parameters)].filter(([, standing]) => standing.over === true);
  return new Map(over.map(([key, { ruleId, axis }]) => [key, { ruleId, axis }]));
}
