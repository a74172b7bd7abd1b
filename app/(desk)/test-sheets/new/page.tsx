import type { Metadata } from "next";
import Link from "next/link";
import { z } from "zod";
import { TestCautions } from "@/components/test-sheet/cautions";
import { StartForm } from "@/components/test-sheet/start-form";
import { Button } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { SelectField, TextField } from "@/components/ui/field";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { parameterDefinition } from "@/lib/domain/parameters";
import {
  isLadder,
  LADDER_PARAMETERS,
  TEST_WORDS,
  TESTS,
  testSchema,
  type Test,
} from "@/lib/domain/test-sheets";
import { insideUnit } from "@/lib/domain/units";
import { load, pageActor, type PageContext } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { may } from "@/lib/policies/decide";
import { axisWord } from "@/lib/review/axis-word";
import { listMachines } from "@/lib/services/machines/list";
import { proposeSheet, type ProposedSheet } from "@/lib/services/test-sheets/propose";

export const metadata: Metadata = { title: "Start a test sheet" };

const query = z.object({
  machineId: z.uuid().optional(),
  changeId: z.uuid().optional(),
  axis: z.string().trim().max(40).optional(),
  test: testSchema.optional(),
  q: z.string().trim().max(80).optional(),
});
type Query = z.infer<typeof query>;

export default async function NewTestSheetPage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("test_sheets.read");
  const { query: asked } = await readParams(query, searchParams);
  if (!asked.machineId) return <MachineChoice context={context} q={asked.q ?? ""} />;
  const mayStart = may(context.actor, "test_sheets.write");
  const { machineId, changeId = null, axis = null, test = null } = asked;
  const proposed = await load(proposeSheet(context, { machineId, changeId, axis, test }));
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            <Link href={`/machines/${machineId}`}>{proposed.machine.serial}</Link>
            {proposed.change && (
              <>
                {" · for "}
                <Link href={`/changes/${proposed.change.id}`}>{proposed.change.label}</Link>
              </>
            )}
          </>
        }
        title={mayStart ? "Start a test sheet" : "Plan of a test"}
        subtitle={
          proposed.change
            ? "The plan rests on the text of this change."
            : "The plan rests on what the machine is required to run."
        }
      />
      <TestChoice asked={asked} proposed={proposed} />
      {axis !== null && test !== null && (
        <Plan {...{ machineId, changeId, axis, test, proposed, mayStart }} />
      )}
    </Sheet>
  );
}

async function MachineChoice({ context, q }: { readonly context: PageContext; readonly q: string }) {
  const { items } = await load(listMachines(context, { page: 1, pageSize: 20, ...(q ? { q } : {}) }));
  return (
    <Sheet>
      <SheetHead title="Start a test sheet" subtitle="On which machine?" />
      <search>
        <form method="get" className="field-columns">
          <TextField
            label="Part of its serial number"
            name="q"
            type="search"
            maxLength={80}
            defaultValue={q}
          />
          <div className="acts items-end pb-4">
            <Button type="submit">Show these</Button>
          </div>
        </form>
      </search>
      {items.length === 0 ? (
        <Empty>No machine answers to this.</Empty>
      ) : (
        <ul className="moved-tests">
          {items.map(({ id, serial, site }) => (
            <li key={id}>
              <Link href={`/test-sheets/new?machineId=${id}`}>{serial}</Link>{" "}
              <span className="quiet">{site.name}</span>
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}

function TestChoice({ asked, proposed }: { readonly asked: Query; readonly proposed: ProposedSheet }) {
  return (
    <form method="get" className="field-columns">
      <input type="hidden" name="machineId" value={proposed.machine.id} />
      {asked.changeId && <input type="hidden" name="changeId" value={asked.changeId} />}
      <SelectField label="Axis" name="axis" defaultValue={asked.axis ?? proposed.axes[0]?.axis}>
        {proposed.axes.map(({ axis }) => (
          <option key={axis} value={axis}>
            {axisWord(axis)}
          </option>
        ))}
      </SelectField>
      <SelectField label="Test" name="test" defaultValue={asked.test ?? "acceleration_ladder"}>
        {TESTS.map((test) => (
          <option key={test} value={test}>
            {TEST_WORDS[test].title}
          </option>
        ))}
      </SelectField>
      <div className="acts items-end pb-4">
        <Button type="submit">Plan this test</Button>
      </div>
    </form>
  );
}

interface PlanProps {
  readonly machineId: string;
  readonly changeId: string | null;
  readonly axis: string;
  readonly test: Test;
  readonly proposed: ProposedSheet;
  /** Others read the plan alone. */
  readonly mayStart: boolean;
}

function Plan({ machineId, changeId, axis, test, proposed: { planned, axes }, mayStart }: PlanProps) {
  if (planned === null) return <Empty>This machine has no axis {axisWord(axis)}.</Empty>;
  const plan = planned.ok ? planned.plan : null;
  const { dimension } = parameterDefinition(
    isLadder(test) ? LADDER_PARAMETERS[test].parameter : "acceleration",
  );
  const kind = axes.find((known) => known.axis.toLowerCase() === axis.toLowerCase())?.kind ?? "linear";
  const unit = plan?.ladder?.unit ?? insideUnit(dimension, kind);
  return (
    <>
      <SheetSection title={`${TEST_WORDS[test].title}, ${axisWord(axis)} axis`}>
        <p>{TEST_WORDS[test].trial}</p>
        {plan?.expected.map((line) => (
          <p key={line}>{line}</p>
        ))}
        {plan?.ladder && <p className="quiet">{plan.ladder.why}</p>}
        {!planned.ok && <p>No boundary can be predicted: give start and step yourself. {planned.why}</p>}
      </SheetSection>
      <TestCautions falls={plan?.falls ?? true} />
      {mayStart && <StartForm key={`${axis} ${test}`} {...{ machineId, axis, test, changeId, plan, unit }} />}
    </>
  );
}
