"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { apiCall } from "@/components/api";
import { Done } from "@/components/forms/done";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import { updateUserSchema, type UpdateUser, type UserView } from "@/lib/schemas/people";
import { PersonFields, type SiteChoice, type TypedPerson } from "./person-fields";

const typedSchema = updateUserSchema.extend({
  siteId: z.string().transform((id) => (id === "" ? null : id)),
});

export interface EditPersonProps {
  readonly person: UserView;
  readonly sites: readonly SiteChoice[];
}

export function EditPerson({ person, sites }: EditPersonProps) {
  const { name, email, role, siteId } = person;
  const form = useForm<TypedPerson, unknown, UpdateUser>({
    resolver: zodResolver(typedSchema),
    defaultValues: { name, email, role, siteId: siteId ?? "" },
  });
  const save = useSave({
    form,
    send: (body: UpdateUser) => apiCall<UserView>("PUT", `/users/${person.id}`, { body }),
  });
  return (
    <Form onSubmit={form.handleSubmit((values) => save.mutate(values))}>
      <PersonFields register={form.register} errors={form.formState.errors} sites={sites} />
      <Refusal error={save.error} title="Not saved" />
      {save.isSuccess && (
        <Done>
          <p>Saved. A changed role counts from the person’s next click on.</p>
        </Done>
      )}
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Save
        </Button>
      </div>
    </Form>
  );
}
