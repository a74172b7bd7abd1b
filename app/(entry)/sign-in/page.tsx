import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { DemoSignIns, SignInForm } from "@/components/entry/sign-in";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { ownPath } from "@/lib/domain/own-path";
import { cookieActor } from "@/lib/http/actor";
import { demoSignIns } from "@/lib/server/demo-people";

export const metadata: Metadata = { title: "Sign in" };

interface SignInPageProps {
  readonly searchParams: Promise<{ next?: string | string[] }>;
}

export default async function SignInPage({ searchParams }: SignInPageProps) {
  const { next } = await searchParams;
  const goal = ownPath(typeof next === "string" ? next : null);
  if (await cookieActor()) redirect(goal);
  return (
    <Sheet width="narrow">
      <SheetHead
        title="Sign in to Keepstep"
        subtitle="The desk for the motion settings of stepper-driven machines."
      />
      <SignInForm next={goal} />
      <DemoSignIns people={demoSignIns()} />
    </Sheet>
  );
}
