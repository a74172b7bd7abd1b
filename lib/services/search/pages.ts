import "server-only";
import type { Action } from "@/lib/domain/actions";
import type { SearchHit } from "@/lib/schemas/search";
import { may } from "@/lib/policies/decide";
import type { Context } from "@/lib/services/kernel/context";

interface DeskPage extends SearchHit {
  readonly action: Action;
  /** Words by which people look for it, beside those of its title. */
  readonly words: string;
}

/** What can be done at the desk, and where. */
const PAGES: readonly DeskPage[] = [
  {
    action: "floor.read",
    href: "/floor",
    title: "Floor",
    note: "Where every machine stands",
    words: "machines drift baseline overview fleet",
  },
  {
    action: "readings.create",
    href: "/readings/new",
    title: "Add a reading",
    note: "Upload or paste what a machine runs",
    words: "upload paste text file as-found as-left in service configuration",
  },
  {
    action: "readings.read",
    href: "/readings",
    title: "Readings",
    note: "What was read from machines",
    words: "as-found as-left stored running layer",
  },
  {
    action: "changes.create",
    href: "/changes/new",
    title: "Propose a change",
    note: "Edit a baseline with checks while typing",
    words: "new change request draft deviation concession edit",
  },
  {
    action: "changes.read",
    href: "/changes",
    title: "Changes",
    note: "Change requests and their states",
    words: "evaluation approve decline defer disposition signature decide",
  },
  {
    action: "machines.read",
    href: "/work",
    title: "Work",
    note: "Released steps to carry out",
    words: "implementation apply download verification test lot step technician",
  },
  {
    action: "test_sheets.read",
    href: "/test-sheets",
    title: "Test sheets",
    note: "Ladders, runs and heat records on machines",
    words: "test ladder trial lost steps temperature heat acceleration",
  },
  {
    action: "test_sheets.write",
    href: "/test-sheets/new",
    title: "Start a test sheet",
    note: "On a machine's axis, with the expected reading",
    words: "new test ladder trial lost steps",
  },
  {
    action: "check.run",
    href: "/checks",
    title: "Checks",
    note: "Check a text without keeping it; what is checked and how",
    words: "rules formula limit try paste physics",
  },
  {
    action: "rehearsals.read",
    href: "/rehearsals",
    title: "Rehearsals",
    note: "The fleet on a warm day, or with another part fitted",
    words: "warm day ambient hottest room swap part motor driver rehearsal what if",
  },
  {
    action: "machines.write",
    href: "/machines/new",
    title: "Add a machine",
    note: "Serial number, model and site",
    words: "new machine serial",
  },
  {
    action: "catalog.read",
    href: "/catalog",
    title: "Catalog",
    note: "Hardware, models, key tables",
    words: "motor driver board supply drive train mount hardware",
  },
  {
    action: "catalog.read",
    href: "/catalog/models",
    title: "Machine models",
    note: "Axes and what drives them",
    words: "design axis assembly key table",
  },
  {
    action: "catalog.write",
    href: "/catalog/motor/new",
    title: "Add a motor",
    note: "To the hardware catalog",
    words: "new motor torque resistance inductance",
  },
  {
    action: "catalog.write",
    href: "/catalog/driver/new",
    title: "Add a driver",
    note: "To the hardware catalog",
    words: "new driver sense resistor reference voltage microstep",
  },
  {
    action: "record.read",
    href: "/record",
    title: "Record",
    note: "Every act, searchable, and its chain",
    words: "log history audit who when verify hash",
  },
  {
    action: "users.read",
    href: "/settings/people",
    title: "People",
    note: "Add, change and deactivate people",
    words: "user role admin add person account deactivate",
  },
  {
    action: "tokens.read",
    href: "/settings/tokens",
    title: "Tokens",
    note: "Make and revoke tokens for scripts",
    words: "api token bearer script pipeline",
  },
  {
    action: "catalog.read",
    href: "/settings/sites",
    title: "Sites",
    note: "Places and their ambient temperature",
    words: "site room ambient warm temperature",
  },
  {
    action: "policies.read",
    href: "/settings/policy",
    title: "Policy",
    note: "The team's margins",
    words: "margin torque junction limit stale days",
  },
  {
    action: "account.write",
    href: "/settings/password",
    title: "Your password",
    note: "Change it; your other sessions end",
    words: "change password account",
  },
  {
    action: "account.write",
    href: "/help",
    title: "Help",
    note: "Words, keys, cautions",
    words: "keyboard shortcut meaning glossary",
  },
];

/** Pages that answer to every word, as far as the actor may open them. */
export function findPages({ actor }: Context, words: readonly string[]): SearchHit[] {
  const fits = ({ title, note, words: more }: DeskPage): boolean => {
    const known = `${title} ${note} ${more}`.toLowerCase().split(/[^\p{L}\p{N}]+/u);
    return words.every((word) => known.some((one) => one.startsWith(word)));
  };
  return PAGES.filter((one) => may(actor, one.action) && fits(one)).map(({ href, title, note }) => ({
    href,
    title,
    note,
  }));
}
