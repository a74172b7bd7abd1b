import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { z } from "zod";
import { FactForm } from "@/components/machine-edit/fact-form";
import { FactsTable } from "@/components/machine-edit/facts-table";
import { MachineActs } from "@/components/machine-edit/machine-acts";
import { MachineCopyForm } from "@/components/machine-edit/machine-copy-form";
import { MachineFactsForm } from "@/components/machine-edit/machine-facts-form";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { MACHINE_STATE_WORDS } from "@/lib/domain/machines";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { itemChoices } from "@/lib/services/catalog/choices";
import { listHardware } from "@/lib/services/machines/list-hardware";
import { machineToEdit, type MachineToEdit } from "@/lib/services/machines/show-edit";
import { listSites } from "@/lib/services/sites/list";

export const metadata: Metadata = { title: "Machine, facts and hardware" };

function stateWords({ state, stateReason }: MachineToEdit["machine"]): string {
  return stateReason === "" ? MACHINE_STATE_WORDS[state] : `${MACHINE_STATE_WORDS[state]}: ${stateReason}`;
}

export default async function EditMachinePage({ params }: { readonly params: Promise<{ id: string }> }) {
  const context = await pageActor("machines.hardware");
  const { id } = await params;
  if (!z.uuid().safeParse(id).success) notFound();
  const { machine, model, siteName, axes } = await load(machineToEdit(context, id));
  const [{ facts }, choices, sites] = await Promise.all([
    load(listHardware(context, id)),
    load(itemChoices(context)),
    load(listSites(context, { retired: "no" })),
  ]);
  const siteChoices = sites.items.map((site) => ({ id: site.id, label: `${site.code} ${site.name}` }));
  const mayWrite = may(context.actor, "machines.write");
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href={`/machines/${id}`}>Machine {machine.serial}</Link>}
        title={`${machine.serial}, facts and hardware`}
        subtitle={
          <>
            <Link href={`/catalog/models/${model.id}`}>
              {model.code} {model.name}
            </Link>
            , {siteName}, {stateWords(machine)}
          </>
        }
      />
      {mayWrite && <MachineFactsForm machine={machine} />}
      <SheetSection
        title="Hardware that differs from the model"
        note="What is recorded here counts before the model, with its evidence."
      >
        <FactsTable machineId={id} facts={facts} />
      </SheetSection>
      <SheetSection title="Record hardware">
        <FactForm machineId={id} axes={axes} choices={choices} />
      </SheetSection>
      {mayWrite && (
        <>
          <SheetSection title="Site and state">
            <MachineActs machine={machine} sites={siteChoices} />
          </SheetSection>
          <SheetSection title="Add a machine like this one">
            <MachineCopyForm
              machine={machine}
              sites={siteChoices}
              facts={facts.filter(({ endedAt }) => endedAt === null).length}
            />
          </SheetSection>
        </>
      )}
    </Sheet>
  );
}
