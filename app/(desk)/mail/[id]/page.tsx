import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { MailText } from "@/components/mail/mail-text";
import { DateTime } from "@/components/ui/date-time";
import { Facts } from "@/components/ui/facts";
import { NoValue } from "@/components/ui/quantity";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { pageActor } from "@/lib/http/page-actor";
import { env } from "@/lib/server/env";
import { readMail } from "@/lib/server/mailbox";

export const metadata: Metadata = { title: "Mail" };

export default async function OneMailPage({ params }: { readonly params: Promise<{ id: string }> }) {
  await pageActor("mail.read");
  const mail = await readMail((await params).id);
  if (!mail) notFound();
  return (
    <Sheet>
      <SheetHead kicker={<Link href="/mail">Mails</Link>} title={mail.subject || "(no subject)"} />
      <Facts
        facts={[
          { label: "From", value: mail.from },
          { label: "To", value: mail.to.join(", ") },
          {
            label: "Sent",
            value: mail.sentAt === null ? <NoValue /> : <DateTime value={mail.sentAt.toISOString()} />,
          },
          { label: "Message-ID", value: <span className="code break-all">{mail.messageId}</span> },
        ]}
      />
      <SheetSection title="Plain text">
        <MailText text={mail.text} deskUrl={env().publicUrl} />
      </SheetSection>
      {mail.html !== "" && (
        <SheetSection title="As a mail program draws it" note="Its links stay shut here; use those above.">
          <iframe
            title="The mail as a mail program draws it"
            className="h-[70vh] w-full border border-hairline"
            sandbox=""
            srcDoc={mail.html}
          />
        </SheetSection>
      )}
    </Sheet>
  );
}
