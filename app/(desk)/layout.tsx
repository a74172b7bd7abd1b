import type { ReactNode } from "react";
import { Strip } from "@/components/shell/strip";
import { cookieActor } from "@/lib/http/actor";
import { now } from "@/lib/server/clock";
import { showAccount } from "@/lib/services/account/show";

/** The shell around every page of the desk. Each page decides for itself who may see it. */
export default async function DeskLayout({ children }: { readonly children: ReactNode }) {
  const actor = await cookieActor();
  if (actor?.kind !== "person") return children;
  const { siteId, siteName } = await showAccount({ actor, now: now() });
  const site = siteId && siteName ? { name: siteName, href: `/floor?siteId=${siteId}` } : null;
  return (
    <>
      <Strip person={{ name: actor.name, role: actor.role }} site={site} />
      {children}
    </>
  );
}
