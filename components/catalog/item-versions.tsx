import { DateTime } from "@/components/ui/date-time";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { kindSlug, type ItemView } from "@/lib/schemas/catalog";
import { ChangesList } from "./changes-list";
import { itemChanges } from "./item-changes";
import { PutBack } from "./put-back";

export interface ItemVersionsProps {
  readonly item: ItemView;
  readonly mayWrite: boolean;
}

/** Every version with what it changed; an earlier one can be put back, as a version of its own. */
export function ItemVersions({ item, mayWrite }: ItemVersionsProps) {
  return (
    <Table caption="Versions" captionHidden>
      <thead>
        <tr>
          <Head number>Version</Head>
          <Head>Saved</Head>
          <Head>By</Head>
          <Head>What changed</Head>
          <Head>Evidence</Head>
          {mayWrite && <td />}
        </tr>
      </thead>
      <tbody>
        {item.versions.map((version, index) => {
          const before = item.versions[index + 1];
          return (
            <tr key={version.version}>
              <NumberCell>{version.version}</NumberCell>
              <td>
                <DateTime value={version.createdAt} />
              </td>
              <td>{version.createdByName}</td>
              <td>
                {before ? (
                  <ChangesList changes={itemChanges(item.kind, before, version)} />
                ) : (
                  "put into the catalog"
                )}
              </td>
              <td>{version.evidence}</td>
              {mayWrite && (
                <td>
                  {index > 0 && (
                    <PutBack
                      version={version.version}
                      method="PUT"
                      path={`/catalog/${kindSlug(item.kind)}/${item.id}`}
                      body={{ name: version.name, data: version.data, evidence: version.evidence }}
                      ifMatch={item.version}
                    />
                  )}
                </td>
              )}
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}
