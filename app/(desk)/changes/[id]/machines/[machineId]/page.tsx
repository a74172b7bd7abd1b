import type { Metadata } from "next";
import Link from "next/link";
import type { ReactNode } from "react";
import { notFound } from "next/navigation";
import { z } from "zod";
import { AsLeftStep } from "@/components/implementation/as-left-step";
import { DownloadStep } from "@/components/implementation/download-step";
import { TestStep } from "@/components/implementation/test-step";
import { MovedTestList } from "@/components/test-sheet/moved-tests";
import { Tests } from "@/components/changes/machines-progress";
import { DateTime } from "@/components/ui/date-time";
import { Notice } from "@/components/ui/notice";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { TitleBlock } from "@/components/ui/title-block";
import { OrderSection } from "@/components/solve/order-section";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { machinesOfChange } from "@/lib/services/changes/machines-of-change";
import { orderBasis } from "@/lib/services/implementation/order-basis";
import { showStep, type StepDetail } from "@/lib/services/implementation/steps";
import { testsOfChange } from "@/lib/services/test-sheets/tests-of-change";

interface StepPageProps {
  readonly params: Promise<{ id: string; machineId: string }>;
}

export const metadata: Metadata = { title: "Implementation step" };

const ids = z.object({ id: z.uuid(), machineId: z.uuid() });

export default async function StepPage({ params }: StepPageProps) {
  const context = await pageActor("changes.read");
  const asked = ids.safeParse(await params);
  if (!asked.success) notFound();
  const { id, machineId } = asked.data;
  const step = await load(showStep(context, id, machineId));
  const place = (await load(machinesOfChange(context, id))).find((one) => one.machineId === machineId);
  const { items: moved } = await load(testsOfChange(context, { changeId: id, machineId }));
  const order = await load(orderBasis(context, { changeId: id, machineId }));
  const mayWork = may(context.actor, "verifications.create") && step.verifiedAt === null && !place?.endedAt;
  const whatToTest = (
    <SheetSection title="What to test" note="only what the change moves">
      <MovedTestList
        tests={moved}
        changeId={id}
        machineId={machineId}
        mayStart={may(context.actor, "test_sheets.write") && !place?.endedAt}
      />
    </SheetSection>
  );
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            <Link href={`/changes/${id}`}>{step.changeLabel}</Link> {step.title}
          </>
        }
        title={`${step.serial}: apply and prove`}
        subtitle={`${step.modelName}, ${step.siteName}`}
      />
      <Progress step={step} ended={place?.endedAt ?? null} />
      {mayWork ? (
        <Work
          step={step}
          order={order && <OrderSection basis={order} fromReadings={order.fromReadings} />}
          whatToTest={whatToTest}
        />
      ) : (
        whatToTest
      )}
      <SheetSection title="Tests on this machine">
        {place && place.verifications.length > 0 ? (
          <Tests tests={place.verifications} />
        ) : (
          <p className="quiet">None is recorded yet.</p>
        )}
      </SheetSection>
      <TitleBlock
        title={step.title}
        documentType="Implementation step"
        identificationNumber={`${step.changeLabel}, ${step.serial}`}
        revision="1"
        sheet="1 of 1"
        dateOfIssue={<DateTime value={step.releasedAt} dateOnly />}
        creator="–"
        status={step.verifiedAt ? "verified" : step.appliedAt ? "applied" : "released"}
        approvedBy={<Link href={`/changes/${id}`}>see the change</Link>}
      />
    </Sheet>
  );
}

function Progress({ step, ended }: { readonly step: StepDetail; readonly ended: string | null }) {
  if (ended) return <Notice title="Backed out">This change was backed out on this machine.</Notice>;
  if (step.verifiedAt)
    return (
      <Notice title="Verified">
        Verified <DateTime value={step.verifiedAt} />. Nothing is missing.
      </Notice>
    );
  return <Notice title="Still missing">{step.missing}</Notice>;
}

interface WorkProps {
  readonly step: StepDetail;
  /** In what order to type the new values; null where there is nothing to type. */
  readonly order: ReactNode;
  readonly whatToTest: ReactNode;
}

/** The step's four parts in the order of the work; what to test stands before its result is recorded. */
function Work({ step, order, whatToTest }: WorkProps) {
  const { changeId, machineId, serial, downloadedAt, appliedAt, axes, hasReadBack } = step;
  return (
    <>
      <SheetSection
        title="1. Download the text"
        note={downloadedAt ? <DateTime value={downloadedAt} /> : "the exact text for this machine"}
      >
        <DownloadStep
          changeId={changeId}
          machineId={machineId}
          serial={serial}
          again={downloadedAt !== null}
        />
      </SheetSection>
      <SheetSection title="2. Apply it">
        <p className="caution">
          Motors and drivers may be hot. Expect unexpected motion at power-on and at the first move; keep
          hands out. A raised load can fall when holding current is cut: block it first. Local rules and a
          competent person stand above this page.
        </p>
      </SheetSection>
      {order}
      <SheetSection
        title="3. Read it back"
        note={
          appliedAt ? (
            <DateTime value={appliedAt} />
          ) : hasReadBack ? (
            "stored or running values"
          ) : (
            "the as-left file"
          )
        }
      >
        <AsLeftStep machineId={machineId} serial={serial} hasReadBack={hasReadBack} />
      </SheetSection>
      {whatToTest}
      <SheetSection title="4. Record the test">
        <TestStep changeId={changeId} machineId={machineId} axes={axes} hasReadBack={hasReadBack} />
      </SheetSection>
    </>
  );
}
