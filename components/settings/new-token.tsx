"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm, useWatch } from "react-hook-form";
import { z } from "zod";
import { apiCall } from "@/components/api";
import { Done } from "@/components/forms/done";
import { Form } from "@/components/forms/form";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import { CheckboxField, SelectField, TextField } from "@/components/ui/field";
import { ROLE_WORDS, SCOPE_WORDS } from "@/lib/domain/role-words";
import { ROLES, SCOPES, scopeSchema, type Role, type Scope } from "@/lib/domain/roles";
import { scopesOf } from "@/lib/policies/scopes";
import { typedNumber } from "@/lib/schemas/typed-field";
import { createTokenSchema, TOKEN_DAYS_MAX, type NewToken } from "@/lib/schemas/tokens";

const typedSchema = z.object({
  name: createTokenSchema.shape.name,
  role: createTokenSchema.shape.role,
  scopes: z.array(scopeSchema).min(1, "Choose at least one scope."),
  days: typedNumber(createTokenSchema.shape.days.unwrap()),
});
type Typed = z.input<typeof typedSchema>;
type Sent = z.output<typeof typedSchema>;

const EMPTY: Typed = { name: "", role: "technician", scopes: ["check", "readings"], days: "90" };

export function NewTokenForm() {
  const form = useForm<Typed, unknown, Sent>({
    resolver: zodResolver(typedSchema),
    defaultValues: EMPTY,
  });
  const save = useSave({
    form,
    send: (body: Sent) => apiCall<NewToken>("POST", "/tokens", { body }),
    onSaved: () => form.reset(),
  });
  const role = useWatch({ control: form.control, name: "role" });
  const { errors } = form.formState;
  return (
    <Form onSubmit={form.handleSubmit((values) => save.mutate(values))}>
      <TextField
        label="Name"
        help="Which script it is for, and on which machine."
        autoComplete="off"
        error={errors.name?.message}
        {...form.register("name")}
      />
      <SelectField label="Role" error={errors.role?.message} {...form.register("role")}>
        {ROLES.map((one) => (
          <option key={one} value={one}>
            {one}: {ROLE_WORDS[one]}
          </option>
        ))}
      </SelectField>
      <ScopeFields role={role} error={errors.scopes?.message} register={() => form.register("scopes")} />
      <TextField
        label="Expires after"
        unit="days"
        inputMode="numeric"
        help={`${TOKEN_DAYS_MAX} at most.`}
        error={errors.days?.message}
        {...form.register("days")}
      />
      <Refusal error={save.error} title="No token made" />
      {save.data && <TokenOnce made={save.data} />}
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Make the token
        </Button>
      </div>
    </Form>
  );
}

interface ScopeFieldsProps {
  readonly role: Role;
  readonly error: string | undefined;
  readonly register: () => object;
}

/** The scopes in which the role may do anything; the others are shown as closed. */
function ScopeFields({ role, error, register }: ScopeFieldsProps) {
  const open: readonly Scope[] = scopesOf(role);
  return (
    <fieldset className={error === undefined ? "field" : "field field-wrong"}>
      <legend className="field-legend">Scopes</legend>
      {SCOPES.map((scope) => (
        <CheckboxField
          key={scope}
          label={`${scope}: ${SCOPE_WORDS[scope]}${open.includes(scope) ? "" : ` (not with the role ${role})`}`}
          value={scope}
          {...register()}
        />
      ))}
      {error !== undefined && <p className="field-error">{error}</p>}
    </fieldset>
  );
}

function TokenOnce({ made }: { readonly made: NewToken }) {
  return (
    <Done title={`The token ${made.name}`}>
      <p>Copy it now: it is shown this once, and only its hash is kept.</p>
      <p>
        <code className="code break-all">{made.token}</code>
      </p>
      <p>
        Scopes: {made.scopes.join(", ")}. It goes out as <code className="code">Authorization: Bearer</code>.
      </p>
    </Done>
  );
}
