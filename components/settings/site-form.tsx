"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { apiCall } from "@/components/api";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button, ButtonLink } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { createSiteSchema, type SiteView } from "@/lib/schemas/sites";
import { typedNumber } from "@/lib/schemas/typed-field";

const typedSchema = z.object({
  code: createSiteSchema.shape.code,
  name: createSiteSchema.shape.name,
  ambientC: typedNumber(createSiteSchema.shape.ambientC.unwrap()),
});
type Typed = z.input<typeof typedSchema>;
type Sent = z.output<typeof typedSchema>;

function send(site: SiteView | null, { code, name, ambientC }: Sent): Promise<SiteView> {
  if (!site) return apiCall("POST", "/sites", { body: { code, name, ambientC } });
  return apiCall("PUT", `/sites/${site.id}`, { body: { name, ambientC }, ifMatch: site.version });
}

/** A new site, or one that is there; its code stays. */
export function SiteForm({ site }: { readonly site: SiteView | null }) {
  const router = useRouter();
  const form = useForm<Typed, unknown, Sent>({
    resolver: zodResolver(typedSchema),
    defaultValues: {
      code: site?.code ?? "",
      name: site?.name ?? "",
      ambientC: site?.ambientC === null || site === null ? "" : String(site.ambientC),
    },
  });
  const save = useSave({
    form,
    send: (values: Sent) => send(site, values),
    onSaved: () => router.push("/settings/sites"),
  });
  const { errors } = form.formState;
  return (
    <Form onSubmit={form.handleSubmit((values) => save.mutate(values))}>
      <TextField
        label="Code"
        help={site ? "A code stays as it is." : "Short, as on drawings and labels."}
        autoComplete="off"
        readOnly={site !== null}
        error={errors.code?.message}
        {...form.register("code")}
      />
      <TextField label="Name" autoComplete="off" error={errors.name?.message} {...form.register("name")} />
      <TextField
        label="Ambient temperature, design maximum"
        unit="°C"
        inputMode="decimal"
        autoComplete="off"
        optional
        help="The warmest the room gets at the machines. Left empty, every check of a temperature there is “cannot check”."
        error={errors.ambientC?.message}
        {...form.register("ambientC")}
      />
      <Refusal error={save.error} title="Not saved" />
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          {site ? "Save" : "Add the site"}
        </Button>
        <ButtonLink href="/settings/sites">Leave it</ButtonLink>
      </div>
    </Form>
  );
}
