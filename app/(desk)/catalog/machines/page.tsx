import type { Metadata } from "next";
import Link from "next/link";
import { leafThrough } from "@/components/catalog/pages";
import { Button, ButtonLink } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { SelectField, TextField } from "@/components/ui/field";
import { Pager } from "@/components/ui/pager";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { Head, Table } from "@/components/ui/table";
import { MACHINE_STATE_WORDS, machineStateSchema } from "@/lib/domain/machines";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { modelQuery } from "@/lib/schemas/machine-models";
import { machineQuery, type MachineQuery, type MachineRow } from "@/lib/schemas/machines-read";
import { listMachines } from "@/lib/services/machines/list";
import { listModels } from "@/lib/services/models/list";

export const metadata: Metadata = { title: "Catalog, machines" };

interface PageProps {
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

interface FilterProps {
  readonly query: MachineQuery;
  readonly models: readonly { readonly id: string; readonly code: string; readonly name: string }[];
}

function Filter({ query, models }: FilterProps) {
  return (
    <search>
      <form method="get" className="field-columns">
        <TextField
          label="Part of a serial number"
          name="q"
          type="search"
          defaultValue={query.q}
          maxLength={80}
        />
        <SelectField label="Machine model" name="modelId" defaultValue={query.modelId ?? ""}>
          <option value="">every model</option>
          {models.map(({ id, code, name }) => (
            <option key={id} value={id}>
              {code} {name}
            </option>
          ))}
        </SelectField>
        <SelectField label="Show" name="state" defaultValue={query.state ?? ""}>
          <option value="">all but retired</option>
          {machineStateSchema.options.map((state) => (
            <option key={state} value={state}>
              {MACHINE_STATE_WORDS[state]}
            </option>
          ))}
        </SelectField>
        <div className="acts items-end pb-4">
          <Button type="submit">Show these</Button>
        </div>
      </form>
    </search>
  );
}

function MachineRows({ machines, mayEdit }: { machines: readonly MachineRow[]; mayEdit: boolean }) {
  return (
    <Table caption="Machines" captionHidden>
      <thead>
        <tr>
          <Head>Serial number</Head>
          <Head>Machine model</Head>
          <Head>Site</Head>
          <Head>State</Head>
          {mayEdit && <td />}
        </tr>
      </thead>
      <tbody>
        {machines.map(({ id, serial, model, site, state }) => (
          <tr key={id}>
            <th scope="row">
              <Link href={`/machines/${id}`}>{serial}</Link>
            </th>
            <td>
              <Link href={`/catalog/models/${model.id}`}>{model.code}</Link>
            </td>
            <td>{site.name}</td>
            <td>{MACHINE_STATE_WORDS[state]}</td>
            {mayEdit && (
              <td>
                <Link href={`/machines/${id}/edit`} aria-label={`Facts and hardware of ${serial}`}>
                  facts and hardware
                </Link>
              </td>
            )}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

/** An empty choice of the filter stands as an empty text in the address. */
function filled(query: Record<string, string | string[] | undefined>) {
  return Object.fromEntries(Object.entries(query).filter(([, value]) => value !== ""));
}

export default async function MachinesPage({ searchParams }: PageProps) {
  const context = await pageActor("machines.read");
  const query = machineQuery.safeParse(filled(await searchParams)).data ?? machineQuery.parse({});
  const [found, models] = await Promise.all([
    load(listMachines(context, query)),
    load(listModels(context, modelQuery.parse({ pageSize: 200, retired: "all" }))),
  ]);
  const add = may(context.actor, "machines.write") && (
    <ButtonLink href="/machines/new">New machine</ButtonLink>
  );
  const { q, modelId, state } = query;
  const leaf = leafThrough(found, {
    path: "/catalog/machines",
    filters: { q, modelId, state },
    noun: "machine",
  });
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href="/catalog">Catalog</Link>}
        title="Machines"
        subtitle="Built units, retired ones too. Where each stands is on the floor."
        acts={add}
      />
      <Filter query={query} models={models.items} />
      {found.total === 0 ? (
        <Empty act={add}>
          {q || modelId || state
            ? "No machine fits this."
            : "The machines that were built belong here, each with its serial number and site."}
        </Empty>
      ) : (
        <>
          <MachineRows machines={found.items} mayEdit={may(context.actor, "machines.hardware")} />
          <Pager label="Machines" {...leaf} />
        </>
      )}
    </Sheet>
  );
}
