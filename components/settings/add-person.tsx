"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useForm, type FieldErrors, type UseFormRegister } from "react-hook-form";
import { z } from "zod";
import { apiCall } from "@/components/api";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button, ButtonLink } from "@/components/ui/button";
import { createUserSchema, type CreateUser, type UserView } from "@/lib/schemas/people";
import { PasswordField } from "./password-field";
import { PersonFields, type SiteChoice, type TypedPerson } from "./person-fields";

const typedSite = z.string().transform((id) => (id === "" ? null : id));
const typedSchema = createUserSchema.extend({ siteId: typedSite });
type Typed = TypedPerson & { readonly password: string };

export function AddPerson({ sites }: { readonly sites: readonly SiteChoice[] }) {
  const router = useRouter();
  const form = useForm<Typed, unknown, CreateUser>({
    resolver: zodResolver(typedSchema),
    defaultValues: { name: "", email: "", role: "technician", siteId: "", password: "" },
  });
  const save = useSave({
    form,
    send: (body: CreateUser) => apiCall<UserView>("POST", "/users", { body }),
    onSaved: () => router.push("/settings/people"),
  });
  const { errors } = form.formState;
  return (
    <Form onSubmit={form.handleSubmit((values) => save.mutate(values))}>
      <PersonFields
        register={form.register as unknown as UseFormRegister<TypedPerson>}
        errors={errors as FieldErrors<TypedPerson>}
        sites={sites}
      />
      <PasswordField
        label="First password"
        help="Give it to the person by a safe way; it can be changed under Settings, Your password."
        error={errors.password?.message}
        {...form.register("password")}
      />
      <Refusal error={save.error} title="Not added" />
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Add the person
        </Button>
        <ButtonLink href="/settings/people">Leave it</ButtonLink>
      </div>
    </Form>
  );
}
