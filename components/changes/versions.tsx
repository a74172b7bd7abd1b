import Link from "next/link";
import { DateTime } from "@/components/ui/date-time";
import { Head, NumberCell, Table } from "@/components/ui/table";
import type { ChangeView } from "./change-view";

export interface VersionsProps {
  readonly changeId: string;
  readonly versions: ChangeView["versions"];
  readonly shown: number;
}

/** Every version of the proposal; each can be looked at as it was. */
export function Versions({ changeId, versions, shown }: VersionsProps) {
  return (
    <Table caption="Proposal versions" captionHidden>
      <thead>
        <tr>
          <Head number>Version</Head>
          <Head>Made</Head>
          <Head>By</Head>
          <Head>Note</Head>
          <Head>Hash</Head>
        </tr>
      </thead>
      <tbody>
        {[...versions].reverse().map(({ version, editorName, createdAt, note, signedContentHash }) => (
          <tr key={version}>
            <NumberCell>
              {version === shown ? (
                <span aria-current="page">{version}, shown</span>
              ) : (
                <Link href={`/changes/${changeId}?version=${version}`}>{version}</Link>
              )}
            </NumberCell>
            <td>
              <DateTime value={createdAt} />
            </td>
            <td>{editorName}</td>
            <td>{note}</td>
            <td>
              <code className="code" title={signedContentHash}>
                {signedContentHash.slice(0, 12)}
              </code>
            </td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
