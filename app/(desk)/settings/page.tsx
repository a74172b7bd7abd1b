import type { Metadata } from "next";
import Link from "next/link";
import { Facts } from "@/components/ui/facts";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import type { Action } from "@/lib/domain/actions";
import { ROLE_WORDS } from "@/lib/domain/role-words";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { env } from "@/lib/server/env";
import { showAccount } from "@/lib/services/account/show";

export const metadata: Metadata = { title: "Settings" };

interface Setting {
  readonly href: string;
  readonly title: string;
  readonly note: string;
  readonly action: Action;
}

const SETTINGS: readonly Setting[] = [
  {
    href: "/settings/password",
    title: "Your password",
    note: "Change it; your other sessions end.",
    action: "account.write",
  },
  {
    href: "/settings/people",
    title: "People",
    note: "Who may sign in, with which role.",
    action: "users.read",
  },
  {
    href: "/settings/tokens",
    title: "Tokens",
    note: "For scripts that report texts and ask for checks.",
    action: "tokens.read",
  },
  {
    href: "/settings/sites",
    title: "Sites",
    note: "Where machines stand, and how warm it gets there.",
    action: "catalog.read",
  },
  {
    href: "/settings/policy",
    title: "Policy",
    note: "The team’s margins for the checks.",
    action: "policies.read",
  },
];

const MAIL: Setting = {
  href: "/mail",
  title: "Mails",
  note: "What this demo desk sent; no mail leaves it.",
  action: "mail.read",
};

export default async function SettingsPage() {
  const context = await pageActor("account.write");
  const account = await load(showAccount(context));
  const settings = env().demo ? [...SETTINGS, MAIL] : SETTINGS;
  return (
    <Sheet>
      <SheetHead title="Settings" />
      <Facts
        facts={[
          { label: "Signed in as", value: account.name, note: account.email },
          { label: "Role", value: account.role, note: ROLE_WORDS[account.role] },
          { label: "Site", value: account.siteName ?? "every site" },
        ]}
      />
      <SheetSection title="What you can set or see">
        <ul className="grid gap-2">
          {settings
            .filter(({ action }) => may(context.actor, action))
            .map(({ href, title, note }) => (
              <li key={href}>
                <Link href={href}>{title}</Link> <span className="quiet">{note}</span>
              </li>
            ))}
        </ul>
      </SheetSection>
    </Sheet>
  );
}
