import type { Metadata } from "next";
import Link from "next/link";
import { z } from "zod";
import { MachineCreateForm } from "@/components/machine-edit/machine-create-form";
import { ButtonLink } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { modelQuery } from "@/lib/schemas/machine-models";
import { listModels } from "@/lib/services/models/list";
import { listSites } from "@/lib/services/sites/list";

export const metadata: Metadata = { title: "New machine" };

interface PageProps {
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function NewMachinePage({ searchParams }: PageProps) {
  const context = await pageActor("machines.write");
  const wanted = z.uuid().safeParse((await searchParams).modelId).data ?? "";
  const [models, sites] = await Promise.all([
    load(listModels(context, modelQuery.parse({ pageSize: 200 }))),
    load(listSites(context, { retired: "no" })),
  ]);
  return (
    <Sheet width="narrow">
      <SheetHead
        kicker={<Link href="/catalog/machines">Machines</Link>}
        title="New machine"
        subtitle="It requires its model's released baseline from now on, and is not read until somebody reads it."
      />
      {models.total === 0 && (
        <Empty
          act={
            may(context.actor, "models.write") && (
              <ButtonLink href="/catalog/models/new">New machine model</ButtonLink>
            )
          }
        >
          A machine is built after a machine model, and there is none yet.
        </Empty>
      )}
      {sites.items.length === 0 && (
        <Empty
          act={may(context.actor, "sites.write") && <ButtonLink href="/settings/sites">Sites</ButtonLink>}
        >
          A machine stands at a site, and there is none yet; an admin makes one.
        </Empty>
      )}
      {models.total > 0 && sites.items.length > 0 && (
        <MachineCreateForm
          models={models.items.map(({ id, code, name }) => ({ id, label: `${code} ${name}` }))}
          sites={sites.items.map(({ id, code, name }) => ({ id, label: `${code} ${name}` }))}
          modelId={wanted}
        />
      )}
    </Sheet>
  );
}
