"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import { apiCall } from "@/components/api";
import { Done } from "@/components/forms/done";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { PASSWORD_MIN } from "@/lib/domain/password";
import { changePasswordSchema, type ChangePassword, type EndedSessions } from "@/lib/schemas/people";
import { PasswordField } from "./password-field";

/** One's own password. `email` lets a password store know whose it is. */
export function OwnPasswordForm({ email }: { readonly email: string }) {
  const form = useForm<ChangePassword>({
    resolver: zodResolver(changePasswordSchema),
    defaultValues: { currentPassword: "", password: "" },
  });
  const save = useSave({
    form,
    send: (body: ChangePassword) => apiCall<EndedSessions>("POST", "/account/password", { body }),
    onSaved: () => form.reset(),
  });
  const { errors } = form.formState;
  return (
    <Form onSubmit={form.handleSubmit((values) => save.mutate(values))}>
      <input type="email" autoComplete="username" value={email} readOnly hidden />
      <TextField
        label="Password you have now"
        type="password"
        autoComplete="current-password"
        error={errors.currentPassword?.message}
        {...form.register("currentPassword")}
      />
      <PasswordField
        label="New password"
        help={`At least ${PASSWORD_MIN} characters of any kind; four or five words in a row are good. Not your name or e-mail address.`}
        error={errors.password?.message}
        {...form.register("password")}
      />
      <Refusal error={save.error} title="Not changed" />
      {save.data && (
        <Done>
          <p>Your password is changed. Other sessions of yours that were ended: {save.data.endedSessions}.</p>
        </Done>
      )}
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Change my password
        </Button>
      </div>
    </Form>
  );
}
