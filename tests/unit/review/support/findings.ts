import type { Finding } from "@/lib/domain/findings";

/** A finding with the fields that a test cares for. */
export function finding(fields: Partial<Finding> & Pick<Finding, "ruleId" | "level">): Finding {
  return {
    axis: "x",
    parameters: [],
    sentence: `${fields.ruleId} is ${fields.level}.`,
    value: null,
    limit: null,
    nearLimit: null,
    limitSense: null,
    margin: null,
    unit: "",
    formula: "",
    source: "",
    caution: null,
    spans: [],
    clearingValue: null,
    needs: [],
    assumed: [],
    ...fields,
  };
}
