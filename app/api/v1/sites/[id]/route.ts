import { handle, Versioned } from "@/lib/http/handle";
import { deskOperations } from "@/lib/schemas/operations/desk";
import { showSite } from "@/lib/services/sites/show";
import { updateSite } from "@/lib/services/sites/update";

export const GET = handle(deskOperations.showSite, async ({ context, params }) => {
  const site = await showSite(context, params);
  return new Versioned(site, site.version);
});

export const PUT = handle(deskOperations.updateSite, async ({ context, params, body, ifMatch }) => {
  const site = await updateSite(context, { ...body, ...params, ifMatch });
  return new Versioned(site, site.version);
});
