import type { Metadata } from "next";
import Link from "next/link";
import { ProofSection } from "@/components/checks/proof-section";
import { RuleSheet } from "@/components/checks/rule-sheet";
import { ButtonLink } from "@/components/ui/button";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { pageActor } from "@/lib/http/page-actor";
import { RULES } from "@/lib/rules/table";
import { RULES_VERSION } from "@/lib/rules/version";

export const metadata: Metadata = { title: "Checks" };

export default async function ChecksPage() {
  await pageActor("checks.read");
  return (
    <Sheet>
      <SheetHead
        title="Checks"
        subtitle={`Every configuration goes through these ${RULES.length} checks, rules version ${RULES_VERSION}. They are estimates from catalog data; the physical test and a competent person decide.`}
        acts={
          <>
            <ButtonLink href="/rehearsals">Rehearsals</ButtonLink>
            <ButtonLink variant="primary" href="/readings/new?mode=check">
              Check a text without keeping it
            </ButtonLink>
          </>
        }
      />
      <nav aria-label="Checks on this page">
        <ul className="flex flex-wrap gap-x-5 gap-y-1">
          {RULES.map(({ id, title }) => (
            <li key={id}>
              <a href={`#${id}`}>{title}</a>
            </li>
          ))}
        </ul>
      </nav>
      <p>
        The limits are the defaults; the team&apos;s own margins stand in the{" "}
        <Link href="/settings/policy">policy</Link>. A drive that closes its own loop is not covered: its
        checks of torque, heat and lost steps say cannot check. How far the formulas agree with published
        values stands <a href="#proof">at the end</a>.
      </p>
      {RULES.map((rule) => (
        <RuleSheet key={rule.id} rule={rule} />
      ))}
      <ProofSection />
    </Sheet>
  );
}
