import type { Metadata } from "next";
import Link from "next/link";
import { AddPerson } from "@/components/settings/add-person";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { listSites } from "@/lib/services/sites/list";

export const metadata: Metadata = { title: "Add a person" };

export default async function NewPersonPage() {
  const context = await pageActor("users.write");
  const sites = await load(listSites(context, { retired: "no" }));
  return (
    <Sheet width="narrow">
      <SheetHead kicker={<Link href="/settings/people">People</Link>} title="Add a person" />
      <AddPerson sites={sites.items} />
    </Sheet>
  );
}
