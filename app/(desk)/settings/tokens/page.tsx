import type { Metadata } from "next";
import Link from "next/link";
import { NewTokenForm } from "@/components/settings/new-token";
import { RevokeToken } from "@/components/settings/revoke-token";
import { DateTime } from "@/components/ui/date-time";
import { Empty } from "@/components/ui/empty";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { Head, Table } from "@/components/ui/table";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import type { TokenView } from "@/lib/schemas/tokens";
import { listTokens } from "@/lib/services/tokens/list";

export const metadata: Metadata = { title: "Tokens" };

export default async function TokensPage() {
  const context = await pageActor("tokens.read");
  const { items } = await load(listTokens(context, { state: "all" }));
  const writes = may(context.actor, "tokens.write");
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href="/settings">Settings</Link>}
        title="Tokens"
        subtitle="For scripts. A token has the rights of its role, cut to its scopes, and never signs."
      />
      {items.length === 0 ? (
        <Empty>Tokens belong here: one for each script that reports texts or asks for checks.</Empty>
      ) : (
        <TokenTable tokens={items} writes={writes} />
      )}
      {writes && (
        <SheetSection title="Make a token">
          <NewTokenForm />
        </SheetSection>
      )}
    </Sheet>
  );
}

function TokenTable({ tokens, writes }: { readonly tokens: readonly TokenView[]; readonly writes: boolean }) {
  return (
    <Table caption="Tokens" captionHidden>
      <thead>
        <tr>
          <Head>Name</Head>
          <Head>Role and scopes</Head>
          <Head>Made by</Head>
          <Head>Last used</Head>
          <Head>Expires</Head>
          <Head>State</Head>
          {writes && (
            <Head>
              <span className="visually-hidden">Revoke</span>
            </Head>
          )}
        </tr>
      </thead>
      <tbody>
        {tokens.map((token) => (
          <tr key={token.id}>
            <td>
              {token.name}
              <p className="row-note">
                ends in <span className="code">{token.hint}</span>
              </p>
            </td>
            <td>
              {token.role}
              <p className="row-note">{token.scopes.join(", ")}</p>
            </td>
            <td>
              {token.ownerName}
              <p className="row-note">
                <DateTime value={token.createdAt} dateOnly />
              </p>
            </td>
            <td>{token.lastUsedAt === null ? "never" : <DateTime value={token.lastUsedAt} />}</td>
            <td>
              <DateTime value={token.expiresAt} dateOnly />
            </td>
            <td>{token.state}</td>
            {writes && (
              <td>{token.state === "standing" && <RevokeToken id={token.id} name={token.name} />}</td>
            )}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
