import { expect, test } from "vitest";
import { ROLES } from "@/lib/domain/roles";
import { demoPeople } from "../../../scripts/demo-people.mjs";

test("the demo has somebody for each role, with an address of their own that nobody has", () => {
  const people = demoPeople();
  expect(new Set(people.map(({ role }) => role))).toEqual(new Set(ROLES));
  expect(new Set(people.map(({ email }) => email)).size).toBe(people.length);
  for (const { email, password } of people) {
    expect(email).toMatch(/^[a-z.]+@example\.test$/);
    expect(password.length).toBeGreaterThanOrEqual(12);
  }
});
