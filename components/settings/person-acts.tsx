"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import { apiCall } from "@/components/api";
import { ActButton } from "@/components/forms/act-button";
import { Done } from "@/components/forms/done";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import {
  resetPasswordSchema,
  type EndedSessions,
  type ResetPassword,
  type UserView,
} from "@/lib/schemas/people";
import { PasswordField } from "./password-field";

/** Shuts a person out, or lets the person in again. */
export function DeactivateButton({ person }: { readonly person: Pick<UserView, "id" | "name" | "active"> }) {
  const { id, name, active } = person;
  const send = (reason: string) =>
    apiCall("POST", `/users/${id}/deactivate`, { body: { deactivated: active, reason } });
  return active ? (
    <ActButton label="Deactivate" title={`Deactivate ${name}`} reasoned send={send}>
      <p>
        All sessions of {name} end at once, and tokens that {name} made are refused. What was written and
        signed stays.
      </p>
    </ActButton>
  ) : (
    <ActButton label="Let in again" title={`Let ${name} in again`} reasoned send={send}>
      <p>
        {name} can sign in again with the password of before, and tokens of {name} that have not expired work
        again.
      </p>
    </ActButton>
  );
}

/** A new password for somebody who has lost theirs. */
export function ResetPasswordForm({ person }: { readonly person: Pick<UserView, "id" | "name"> }) {
  const form = useForm<ResetPassword>({
    resolver: zodResolver(resetPasswordSchema),
    defaultValues: { password: "", reason: "" },
  });
  const save = useSave({
    form,
    send: (body: ResetPassword) => apiCall<EndedSessions>("POST", `/users/${person.id}/password`, { body }),
    onSaved: () => form.reset(),
  });
  const { errors } = form.formState;
  return (
    <Form onSubmit={form.handleSubmit((values) => save.mutate(values))}>
      <PasswordField label="New password" error={errors.password?.message} {...form.register("password")} />
      <TextField
        label="Reason"
        help="Kept in the record."
        error={errors.reason?.message}
        {...form.register("reason")}
      />
      <Refusal error={save.error} title="Not changed" />
      {save.data && (
        <Done>
          <p>
            The password is changed. Sessions ended: {save.data.endedSessions}. Give {person.name} the new
            password by a safe way.
          </p>
        </Done>
      )}
      <div className="acts">
        <Button type="submit" busy={save.isPending}>
          Give a new password
        </Button>
      </div>
    </Form>
  );
}
