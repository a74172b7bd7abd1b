import "server-only";
import type { AccountView } from "@/lib/schemas/people";
import { Site } from "@/models/catalog";
import { User } from "@/models/people";
import type { Context } from "@/lib/services/kernel/context";
import { authorize, requirePerson } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";

/** Who I am here: name, role and the site I work at. */
export async function showAccount(context: Context): Promise<AccountView> {
  authorize(context, "account.write");
  const user = await User.findByPk(requirePerson(context).id);
  if (!user) throw notFound("person");
  const site = user.siteId === null ? null : await Site.findByPk(user.siteId);
  return {
    id: user.id,
    name: user.name,
    email: user.email,
    role: user.role,
    siteId: user.siteId,
    siteName: site?.name ?? null,
  };
}
