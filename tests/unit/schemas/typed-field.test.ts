import { expect, test } from "vitest";
import { savePolicySchema } from "@/lib/schemas/policies";
import { createSiteSchema } from "@/lib/schemas/sites";
import { typedNumber } from "@/lib/schemas/typed-field";

const ambient = typedNumber(createSiteSchema.shape.ambientC.unwrap());
const days = typedNumber(savePolicySchema.shape.policy.shape.stale_after_days);

test("a typed number is read with point or comma, and nothing typed is missing", () => {
  expect(ambient.parse("31,5")).toBe(31.5);
  expect(ambient.parse("")).toBeNull();
  expect(ambient.parse("0")).toBe(0);
});

test("what is no number, or out of its range, is refused in words", () => {
  expect(ambient.safeParse("31 °C").error?.issues[0]?.message).toMatch(/Write the number alone/);
  expect(ambient.safeParse("200").error?.issues[0]?.message).toBe("At most 70 °C.");
});

test("a number that must be there is asked for", () => {
  expect(days.safeParse("").error?.issues[0]?.message).toBe("Type a number of days.");
  expect(days.safeParse("2.5").error?.issues[0]?.message).toBe("Whole days.");
});
