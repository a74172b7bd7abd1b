import type { Metadata } from "next";
import Link from "next/link";
import { PolicyForm } from "@/components/settings/policy-form";
import { POLICY_WORDS, policyValue, type PolicyField } from "@/components/settings/policy-words";
import { DateTime } from "@/components/ui/date-time";
import { Empty } from "@/components/ui/empty";
import { Facts } from "@/components/ui/facts";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import type { PolicyVersionView } from "@/lib/schemas/policies";
import { showPolicies } from "@/lib/services/policies/show";

export const metadata: Metadata = { title: "Policy" };

const FIELDS = Object.keys(POLICY_WORDS) as PolicyField[];

export default async function PolicyPage() {
  const context = await pageActor("policies.read");
  const { current, history } = await load(showPolicies(context));
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href="/settings">Settings</Link>}
        title="Policy"
        subtitle={
          current.version === 0
            ? "The product’s defaults stand; the team has not saved its own."
            : `Version ${current.version} stands.`
        }
      />
      <Facts
        facts={FIELDS.map((field) => ({
          label: POLICY_WORDS[field].label,
          value: policyValue(current.policy, field),
          note: POLICY_WORDS[field].help,
        }))}
      />
      {may(context.actor, "policies.write") && (
        <SheetSection title="Change" note="The whole fleet is checked again with a new version.">
          <PolicyForm current={current} />
        </SheetSection>
      )}
      <SheetSection title="Versions" note="Newest first">
        {history.length === 0 ? (
          <Empty>Every saved version of the policy will stand here.</Empty>
        ) : (
          <History versions={history} />
        )}
      </SheetSection>
    </Sheet>
  );
}

function History({ versions }: { readonly versions: readonly PolicyVersionView[] }) {
  return (
    <Table caption="Versions of the policy" captionHidden>
      <thead>
        <tr>
          <Head number>Version</Head>
          {FIELDS.map((field) => (
            <Head key={field} number>
              {POLICY_WORDS[field].label}
            </Head>
          ))}
          <Head>Reason</Head>
          <Head>Saved</Head>
        </tr>
      </thead>
      <tbody>
        {versions.map(({ version, policy, note, createdByName, createdAt }) => (
          <tr key={version}>
            <NumberCell>{version}</NumberCell>
            {FIELDS.map((field) => (
              <NumberCell key={field}>{policyValue(policy, field)}</NumberCell>
            ))}
            <td>{note}</td>
            <td>
              {createdByName}
              {createdAt !== null && (
                <p className="row-note">
                  <DateTime value={createdAt} />
                </p>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
