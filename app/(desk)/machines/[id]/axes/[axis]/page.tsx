import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { z } from "zod";
import { AxisPictures } from "@/components/axis/axis-pictures";
import { AxisQuantities } from "@/components/axis/axis-quantities";
import { FaultFingerprint } from "@/components/axis/fault-fingerprint";
import { HeatingForecast } from "@/components/axis/heating-forecast";
import { MeasuredPredicted } from "@/components/axis/measured-predicted";
import { TestSheetSection } from "@/components/axis/test-sheets";
import { ToleranceOdds } from "@/components/axis/tolerance-odds";
import { VirtualMove } from "@/components/axis/virtual-move";
import { axisTitle } from "@/components/findings/axis-title";
import { FindingsBox } from "@/components/findings/findings-box";
import { AxisHardware } from "@/components/machines/hardware-tables";
import { DateTime } from "@/components/ui/date-time";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { TitleBlock } from "@/components/ui/title-block";
import { gravest, LEVEL_WORDS } from "@/lib/domain/levels";
import { load, pageActor } from "@/lib/http/page-actor";
import { axisBasis, type AxisSheet } from "@/lib/services/machines/axis-basis";

export const metadata: Metadata = { title: "Axis" };

interface PageProps {
  readonly params: Promise<{ id: string; axis: string }>;
}

export default async function AxisPage({ params }: PageProps) {
  const context = await pageActor("machines.read");
  const { id, axis } = await params;
  if (!z.uuid().safeParse(id).success) notFound();
  const sheet = await load(axisBasis(context, { machineId: id, axis: decodeURIComponent(axis) }));
  const { basis, model, siteName } = sheet;
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            <Link href={`/machines/${id}`}>{basis.serial}</Link>, {model.name}, {siteName}
          </>
        }
        title={`${axisTitle(basis.axis)} of ${basis.serial}`}
        subtitle={
          sheet.baseline === null
            ? "No baseline has been released to this machine."
            : `As baseline ${sheet.baseline} with the machine's permitted deviations requires it, on the machine's own hardware.`
        }
      />
      <Contents />
      <Hardware sheet={sheet} />
      <AxisPictures basis={basis} />
      <VirtualMove basis={basis} />
      <ToleranceOdds basis={basis} />
      <HeatingForecast basis={basis} />
      <MeasuredPredicted basis={basis} />
      <FaultFingerprint basis={basis} />
      <TestSheetSection basis={basis} />
      <AxisTitleBlock sheet={sheet} now={context.now} />
    </Sheet>
  );
}

const CONTENTS = [
  ["operating-map", "Operating map"],
  ["torque-curve", "Torque curve"],
  ["temperature-rise", "Temperature rise"],
  ["virtual-move", "Virtual test move"],
  ["tolerance-odds", "Tolerance odds"],
  ["heating-forecast", "Settled temperature"],
  ["measured-predicted", "Measured against predicted"],
  ["fault-fingerprint", "Fault fingerprint"],
  ["tests", "Test on the machine"],
] as const;

function Contents() {
  return (
    <nav aria-label="On this sheet">
      <ul className="flex flex-wrap gap-x-5 gap-y-1">
        {CONTENTS.map(([id, words]) => (
          <li key={id}>
            <a href={`#${id}`}>{words}</a>
          </li>
        ))}
      </ul>
    </nav>
  );
}

function Hardware({ sheet }: { readonly sheet: AxisSheet }) {
  const { basis, fitted, own, quantities, findings } = sheet;
  const hardware = basis.assembly.axes.find(({ axis }) => axis === basis.axis);
  return (
    <SheetSection title="What the axis is" id="hardware">
      {hardware && <AxisHardware axis={hardware} fitted={fitted} own={own} />}
      <AxisQuantities quantities={quantities} />
      <details className="mt-3" open={findings.some(({ level }) => level === "over")}>
        <summary>Every check of this axis as required</summary>
        <FindingsBox
          findings={findings}
          label={`Checks of the ${axisTitle(basis.axis)} as required`}
          empty="There is nothing to check: no baseline has been released to this machine."
        />
      </details>
    </SheetSection>
  );
}

function AxisTitleBlock({ sheet, now }: { readonly sheet: AxisSheet; readonly now: Date }) {
  const { basis, model, baseline, findings } = sheet;
  return (
    <TitleBlock
      title={`${axisTitle(basis.axis)}, ${model.name}`}
      documentType="Axis sheet"
      identificationNumber={`${basis.serial} ${basis.axis.toUpperCase()}`}
      revision={baseline === null ? "no baseline" : `baseline ${baseline}`}
      sheet="1 of 1"
      dateOfIssue={<DateTime value={now.toISOString()} />}
      creator="Keepstep, from catalog, hardware and baseline"
      status={
        findings.length === 0 ? "nothing to check" : LEVEL_WORDS[gravest(findings.map(({ level }) => level))]
      }
      approvedBy="–"
    />
  );
}
