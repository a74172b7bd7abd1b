import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { z } from "zod";
import { AxesTable, ItemLink } from "@/components/catalog/axes-table";
import { ModelFormSheet } from "@/components/catalog/model-form";
import { ModelVersions } from "@/components/catalog/model-versions";
import { RetireAndCopy } from "@/components/catalog/retire-and-copy";
import { ButtonLink } from "@/components/ui/button";
import { Facts } from "@/components/ui/facts";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { plural } from "@/lib/domain/sentences";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import type { ModelView } from "@/lib/schemas/machine-models";
import { itemChoices } from "@/lib/services/catalog/choices";
import { showModel } from "@/lib/services/models/show";

export const metadata: Metadata = { title: "Catalog, machine model" };

function ModelToRead({ model }: { readonly model: ModelView }) {
  const { supply, controller_board: board, enclosure_rise_k: rise, has_read_back: readBack } = model.hardware;
  return (
    <SheetSection title="Hardware">
      <Facts
        facts={[
          { label: "Supply", value: <ItemLink kind="supply" id={supply} items={model.items} /> },
          {
            label: "Controller board",
            value: <ItemLink kind="controller_board" id={board} items={model.items} />,
          },
          { label: "Rise inside the enclosure", value: rise === undefined ? "not stated" : `${rise} K` },
          { label: "Read-back", value: readBack ? "yes" : "no" },
        ]}
      />
      <AxesTable model={model} />
    </SheetSection>
  );
}

export default async function ModelPage({ params }: { readonly params: Promise<{ id: string }> }) {
  const context = await pageActor("catalog.read");
  const { id } = await params;
  if (!z.uuid().safeParse(id).success) notFound();
  const model = await load(showModel(context, id));
  const mayWrite = may(context.actor, "models.write");
  const { code, name, version, machines, retiredAt, keyTableVersion } = model;
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            <Link href="/catalog">Catalog</Link>, <Link href="/catalog/models">machine models</Link>
          </>
        }
        title={`${code} ${name}`}
        subtitle={
          <>
            Version {version},{" "}
            <Link href={`/catalog/machines?modelId=${id}`}>{plural(machines, "machine")}</Link>
            {retiredAt && ", retired: no machine can be added"}
          </>
        }
        acts={
          <>
            <ButtonLink href={`/catalog/models/${id}/key-table`}>
              {keyTableVersion === 0 ? "Make the key table" : "Key table"}
            </ButtonLink>
            {mayWrite && (
              <RetireAndCopy
                apiPath={`/machine-models/${id}`}
                pagePath="/catalog/models"
                noun="machine model"
                code={code}
                name={name}
                retired={retiredAt !== null}
                copyNote="The copy starts with the same axes, hardware and key table; baselines and machines are not copied."
              />
            )}
          </>
        }
      />
      {mayWrite ? (
        <ModelFormSheet model={model} choices={await load(itemChoices(context))} />
      ) : (
        <ModelToRead model={model} />
      )}
      <SheetSection title="Versions" note="Every version stays readable.">
        <ModelVersions model={model} mayWrite={mayWrite} />
      </SheetSection>
    </Sheet>
  );
}
