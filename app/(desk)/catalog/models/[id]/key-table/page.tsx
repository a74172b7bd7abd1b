import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { z } from "zod";
import { KeyTableEditor } from "@/components/catalog/key-table-editor";
import { PutBack } from "@/components/catalog/put-back";
import { DateTime } from "@/components/ui/date-time";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import type { KeyTableView } from "@/lib/schemas/key-tables";
import { showKeyTable } from "@/lib/services/key-tables/show";
import { modelAxisShapes } from "@/lib/services/models/axis-shapes";
import { showModel } from "@/lib/services/models/show";

export const metadata: Metadata = { title: "Catalog, key table" };

interface VersionsProps {
  readonly table: KeyTableView;
  readonly mayWrite: boolean;
}

function Versions({ table, mayWrite }: VersionsProps) {
  return (
    <SheetSection title="Versions" note="Every version stays readable.">
      <Table caption="Versions" captionHidden>
        <thead>
          <tr>
            <Head number>Version</Head>
            <Head>Saved</Head>
            <Head>By</Head>
            <Head number>Rows</Head>
            <Head>Note</Head>
            {mayWrite && <td />}
          </tr>
        </thead>
        <tbody>
          {table.versions.map(({ version, createdAt, createdByName, rules, note }) => (
            <tr key={version}>
              <NumberCell>{version}</NumberCell>
              <td>
                <DateTime value={createdAt} />
              </td>
              <td>{createdByName}</td>
              <NumberCell>{rules.length}</NumberCell>
              <td>{note}</td>
              {mayWrite && (
                <td>
                  {version < table.version && (
                    <PutBack
                      version={version}
                      method="POST"
                      path="/key-tables"
                      body={{ modelId: table.modelId, rules, note: `Version ${version} put back` }}
                      ifMatch={table.version}
                    />
                  )}
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </Table>
    </SheetSection>
  );
}

export default async function KeyTablePage({ params }: { readonly params: Promise<{ id: string }> }) {
  const context = await pageActor("catalog.read");
  const { id } = await params;
  if (!z.uuid().safeParse(id).success) notFound();
  const model = await load(showModel(context, id));
  const [table, axes] = await Promise.all([
    load(showKeyTable(context, id)),
    load(modelAxisShapes(context, id)),
  ]);
  const mayWrite = may(context.actor, "key_tables.write");
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            <Link href="/catalog">Catalog</Link>, <Link href="/catalog/models">machine models</Link>,{" "}
            <Link href={`/catalog/models/${id}`}>{model.code}</Link>
          </>
        }
        title={`Key table of ${model.code}`}
        subtitle="Which key of a text is which parameter, in which unit, and for a current whether it is peak or rms. {axis} in a key stands for the name of an axis; a unit written in the text beats the table's."
      />
      <KeyTableEditor table={table} axes={axes} mayWrite={mayWrite} />
      {table.versions.length > 0 && <Versions table={table} mayWrite={mayWrite} />}
    </Sheet>
  );
}
