import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { RecordList } from "@/components/record/record-list";
import { EditPerson } from "@/components/settings/edit-person";
import { DeactivateButton, ResetPasswordForm } from "@/components/settings/person-acts";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { idParams } from "@/lib/schemas/common";
import { recordOfObject } from "@/lib/services/record/of-object";
import { listSites } from "@/lib/services/sites/list";
import { showUser } from "@/lib/services/users/show";

export const metadata: Metadata = { title: "Person" };

export default async function PersonPage({ params }: { readonly params: Promise<{ id: string }> }) {
  const context = await pageActor("users.write");
  const parsed = idParams.safeParse(await params);
  if (!parsed.success) notFound();
  const [person, sites, events] = await load(
    Promise.all([
      showUser(context, parsed.data),
      listSites(context, { retired: "no" }),
      recordOfObject(context, { type: "person", id: parsed.data.id }),
    ]),
  );
  const own = person.id === context.actor.id;
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href="/settings/people">People</Link>}
        title={person.name}
        subtitle={`${person.role}, ${person.active ? "active" : "deactivated"}`}
        acts={<DeactivateButton person={person} />}
      />
      <SheetSection title="Person">
        <EditPerson person={person} sites={sites.items} />
      </SheetSection>
      <SheetSection title="Password">
        {own ? (
          <p>
            This is you: <Link href="/settings/password">change your own password</Link>.
          </p>
        ) : (
          <ResetPasswordForm person={person} />
        )}
      </SheetSection>
      <SheetSection title="Record">
        <RecordList events={events} caption={`Record of ${person.name}`} />
      </SheetSection>
    </Sheet>
  );
}
