import { DateTime } from "@/components/ui/date-time";
import { Head, NumberCell, Table } from "@/components/ui/table";
import type { ModelView } from "@/lib/schemas/machine-models";
import { ChangesList } from "./changes-list";
import { modelChanges } from "./model-changes";
import { PutBack } from "./put-back";

export interface ModelVersionsProps {
  readonly model: ModelView;
  readonly mayWrite: boolean;
}

/** Every version with what it changed; an earlier one can be put back, as a version of its own. */
export function ModelVersions({ model, mayWrite }: ModelVersionsProps) {
  return (
    <Table caption="Versions" captionHidden>
      <thead>
        <tr>
          <Head number>Version</Head>
          <Head>Saved</Head>
          <Head>By</Head>
          <Head>What changed</Head>
          {mayWrite && <td />}
        </tr>
      </thead>
      <tbody>
        {model.versions.map((version, index) => {
          const before = model.versions[index + 1];
          return (
            <tr key={version.version}>
              <NumberCell>{version.version}</NumberCell>
              <td>
                <DateTime value={version.createdAt} />
              </td>
              <td>{version.createdByName}</td>
              <td>
                {before ? (
                  <ChangesList changes={modelChanges(before.hardware, version.hardware, model.items)} />
                ) : (
                  "made"
                )}
              </td>
              {mayWrite && (
                <td>
                  {index > 0 && (
                    <PutBack
                      version={version.version}
                      method="PUT"
                      path={`/machine-models/${model.id}`}
                      body={{ name: model.name, hardware: version.hardware }}
                      ifMatch={model.version}
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
