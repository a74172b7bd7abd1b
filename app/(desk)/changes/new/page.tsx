import type { Metadata } from "next";
import Link from "next/link";
import { z } from "zod";
import { ProposalEditor } from "@/components/editor/proposal-editor";
import { Empty } from "@/components/ui/empty";
import { ButtonLink } from "@/components/ui/button";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { Head, Table } from "@/components/ui/table";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { proposalStart } from "@/lib/services/changes/start";
import { listModels } from "@/lib/services/models/list";

export const metadata: Metadata = { title: "Propose a change" };

const query = z.object({ model: z.uuid().optional(), machine: z.uuid().optional() });

export default async function NewChangePage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("changes.create");
  const { model, machine } = (await readParams(query, searchParams)).query;
  if (!model && !machine) {
    const models = await load(listModels(context, { page: 1, pageSize: 200, retired: "no" }));
    return <ModelChoice models={models.items} />;
  }
  const start = await load(
    proposalStart(context, machine ? { machineId: machine } : { modelId: model ?? "" }),
  );
  const what = start.machine
    ? `a permitted deviation of ${start.machine.serial}`
    : `a change of the baseline of ${start.model.name}`;
  return (
    <Sheet>
      <SheetHead
        kicker={`Starting from ${start.baseLabel}`}
        title={`Propose ${what}`}
        subtitle="Edit the text; what it does to findings and effects stands beside it as you type."
      />
      <ProposalEditor start={start} change={null} />
    </Sheet>
  );
}

function ModelChoice({ models }: { readonly models: readonly { id: string; code: string; name: string }[] }) {
  return (
    <Sheet>
      <SheetHead
        title="Propose a change"
        subtitle="Of which machine model? For a permitted deviation of one machine, start from that machine's page."
      />
      {models.length === 0 ? (
        <Empty act={<ButtonLink href="/catalog/models/new">Make a machine model</ButtonLink>}>
          There is no machine model yet. A change is made for a model or for one of its machines.
        </Empty>
      ) : (
        <Table caption="Machine models" captionHidden>
          <thead>
            <tr>
              <Head>Machine model</Head>
              <Head>Code</Head>
            </tr>
          </thead>
          <tbody>
            {models.map(({ id, code, name }) => (
              <tr key={id}>
                <th scope="row">
                  <Link href={`/changes/new?model=${id}`}>{name}</Link>
                </th>
                <td>{code}</td>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
    </Sheet>
  );
}
