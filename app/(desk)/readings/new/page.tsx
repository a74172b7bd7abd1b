import type { Metadata } from "next";
import { z } from "zod";
import { ReadingForm } from "@/components/readings/reading-form";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { FORMATS } from "@/lib/parsers/types";
import { may } from "@/lib/policies/decide";
import { machineBrief } from "@/lib/services/machines/brief";
import { listModels } from "@/lib/services/models/list";

export const metadata: Metadata = { title: "Add a reading" };

const query = z.object({ machine: z.uuid().optional(), mode: z.enum(["keep", "check"]).optional() });

export default async function NewReadingPage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("check.run");
  const asked = (await readParams(query, searchParams)).query;
  const machine = asked.machine ? await load(machineBrief(context, asked.machine)) : null;
  const models = await load(listModels(context, { page: 1, pageSize: 200, retired: "no" }));
  const mayKeep = may(context.actor, "readings.create");
  return (
    <Sheet>
      <SheetHead
        title={mayKeep ? "Add a reading" : "Check a text"}
        subtitle={
          mayKeep
            ? "Drop what was read from a machine: it is kept byte for byte and checked against the machine's own hardware."
            : "Drop a configuration text: it is checked against the physics of its axes and not kept."
        }
      />
      <ReadingForm
        machine={machine}
        models={models.items.map(({ id, code, name }) => ({ id, name: `${code} ${name}` }))}
        mayKeep={mayKeep}
        mayMap={may(context.actor, "key_tables.write")}
        startWithCheck={asked.mode === "check"}
        formats={FORMATS}
      />
    </Sheet>
  );
}
