import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { DateTime } from "@/components/ui/date-time";
import { Empty } from "@/components/ui/empty";
import { NoValue } from "@/components/ui/quantity";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { Head, Table } from "@/components/ui/table";
import { pageActor } from "@/lib/http/page-actor";
import { env } from "@/lib/server/env";
import { listMails, type CaughtMail } from "@/lib/server/mailbox";

export const metadata: Metadata = { title: "Mails" };

export default async function MailPage() {
  await pageActor("mail.read");
  if (!env().demo) notFound();
  const mails = await listMails();
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href="/settings">Settings</Link>}
        title="Mails"
        subtitle="What this demo desk sent, newest first. The local catcher keeps it; no mail leaves this computer."
      />
      {mails.length === 0 ? (
        <Empty act={<Link href="/changes">To the changes</Link>}>
          Mails belong here as soon as a change is submitted, decided or released.
        </Empty>
      ) : (
        <MailTable mails={mails} />
      )}
    </Sheet>
  );
}

function MailTable({ mails }: { readonly mails: readonly CaughtMail[] }) {
  return (
    <Table caption="Mails, newest first" captionHidden>
      <thead>
        <tr>
          <Head>Subject</Head>
          <Head>To</Head>
          <Head>Sent</Head>
        </tr>
      </thead>
      <tbody>
        {mails.map((mail) => (
          <tr key={mail.id}>
            <td>
              <Link href={`/mail/${mail.id}`}>{mail.subject || "(no subject)"}</Link>
            </td>
            <td>{mail.to.join(", ")}</td>
            <td>{mail.sentAt === null ? <NoValue /> : <DateTime value={mail.sentAt.toISOString()} />}</td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
