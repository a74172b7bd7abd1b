import { readFileSync } from "node:fs";

/**
 * The people of the demo fleet, at least one a role; all invented. Their passwords are printed at every start, shown
 * on the sign-in page of a demo desk, and open only a desk that was filled with demo data.
 */
export function demoPeople() {
  return JSON.parse(readFileSync(new URL("../lib/server/demo-people.json", import.meta.url), "utf8"));
}
