import type { Metadata } from "next";
import Link from "next/link";
import { OwnPasswordForm } from "@/components/settings/own-password";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { showAccount } from "@/lib/services/account/show";

export const metadata: Metadata = { title: "Your password" };

export default async function PasswordPage() {
  const context = await pageActor("account.write");
  const { email } = await load(showAccount(context));
  return (
    <Sheet width="narrow">
      <SheetHead
        kicker={<Link href="/settings">Settings</Link>}
        title="Your password"
        subtitle="A changed password ends all your other sessions at once; this one goes on."
      />
      <OwnPasswordForm email={email} />
    </Sheet>
  );
}
