import type { Metadata } from "next";
import { ButtonLink } from "@/components/ui/button";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { ACTIONS, type Action } from "@/lib/domain/actions";
import { joinWords } from "@/lib/domain/sentences";
import { pageActor } from "@/lib/http/page-actor";
import { POLICY_TABLE } from "@/lib/policies/table";

export const metadata: Metadata = { title: "Not allowed" };

interface NotAllowedProps {
  readonly searchParams: Promise<{ why?: string | string[] }>;
}

const isAction = (why: unknown): why is Action => ACTIONS.some((action) => action === why);

export default async function NotAllowedPage({ searchParams }: NotAllowedProps) {
  const { actor } = await pageActor("account.write");
  const { why } = await searchParams;
  return (
    <Sheet width="narrow">
      <SheetHead title="This is not for your role" subtitle="Nothing was changed." />
      <p>
        You are signed in as {actor.name}, with the role {actor.role}.
        {isAction(why) && ` What you asked for takes the role ${joinWords(POLICY_TABLE[why].roles, "or")}.`}{" "}
        An admin can give you another role under Settings, People.
      </p>
      <div className="acts">
        <ButtonLink variant="primary" href="/floor">
          To the floor
        </ButtonLink>
      </div>
    </Sheet>
  );
}
