import type { Metadata } from "next";
import { Help } from "@/components/shell/help";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { pageActor } from "@/lib/http/page-actor";

export const metadata: Metadata = { title: "Help" };

export default async function HelpPage() {
  await pageActor("account.write");
  return (
    <Sheet>
      <SheetHead title="Help" />
      <Help />
    </Sheet>
  );
}
