import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { z } from "zod";
import { TestCautions } from "@/components/test-sheet/cautions";
import { SheetRunner } from "@/components/test-sheet/sheet-runner";
import { SHEET_STATE_WORDS } from "@/components/test-sheet/sheets-table";
import { DateTime } from "@/components/ui/date-time";
import { Facts } from "@/components/ui/facts";
import { ParameterQuantity } from "@/components/ui/quantity";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { TitleBlock } from "@/components/ui/title-block";
import { parameterLabel } from "@/lib/domain/parameters";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { axisWord } from "@/lib/review/axis-word";
import type { SheetView } from "@/lib/schemas/test-sheets";
import { showSheet } from "@/lib/services/test-sheets/show";

export const metadata: Metadata = { title: "Test sheet" };

export default async function TestSheetPage({ params }: { readonly params: Promise<{ id: string }> }) {
  const context = await pageActor("test_sheets.read");
  const id = z.uuid().safeParse((await params).id);
  if (!id.success) notFound();
  const sheet = await load(showSheet(context, id.data));
  const { machine, axis, change, label, title, siteName, plan } = sheet;
  const { actor } = context;
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            <Link href={`/machines/${machine.id}`}>{machine.serial}</Link>, {siteName}
            {change && (
              <>
                {" · for "}
                <Link href={`/changes/${change.id}/machines/${machine.id}`}>{change.label}</Link>
              </>
            )}
          </>
        }
        title={`${title}, ${axisWord(axis)} axis`}
        subtitle={label}
      />
      {sheet.closing === null && <TestCautions falls={plan.falls} />}
      <Expected plan={plan} change={change} />
      <SheetRunner
        key={sheet.id}
        initial={sheet}
        person={{ id: actor.id, name: actor.name }}
        mayEnter={may(actor, "test_sheets.write")}
      />
      <TitleBlock
        title={`${title}, ${axisWord(axis)} axis of ${machine.serial}`}
        documentType="Test sheet"
        identificationNumber={label}
        revision="1"
        sheet="1 of 1"
        dateOfIssue={<DateTime value={sheet.createdAt} dateOnly />}
        creator={sheet.actorName}
        status={SHEET_STATE_WORDS[sheet.state]}
        approvedBy={sheet.closing ? `closed by ${sheet.closing.actorName}` : "–"}
      />
    </Sheet>
  );
}

/** What the test is made at, and the reading printed beforehand. */
function Expected({ plan, change }: Pick<SheetView, "plan" | "change">) {
  const facts = plan.settings.map((setting) => ({
    label: parameterLabel(setting.parameter, plan.axisKind),
    value: <ParameterQuantity {...setting} />,
    note: change ? `as ${change.label} sets it` : "as required",
  }));
  return (
    <SheetSection title="Expected reading">
      {plan.expected.map((line) => (
        <p key={line}>{line}</p>
      ))}
      {plan.ladder && <p className="quiet">{plan.ladder.why}</p>}
      {facts.length > 0 && <Facts facts={facts} />}
    </SheetSection>
  );
}
