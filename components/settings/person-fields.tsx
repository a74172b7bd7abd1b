import type { FieldErrors, UseFormRegister } from "react-hook-form";
import { SelectField, TextField } from "@/components/ui/field";
import { ROLE_WORDS } from "@/lib/domain/role-words";
import { ROLES, type Role } from "@/lib/domain/roles";

/** A person as typed; an empty site is every site. */
export interface TypedPerson {
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly siteId: string;
}

export interface SiteChoice {
  readonly id: string;
  readonly name: string;
}

export interface PersonFieldsProps {
  readonly register: UseFormRegister<TypedPerson>;
  readonly errors: FieldErrors<TypedPerson>;
  readonly sites: readonly SiteChoice[];
}

/** Who a person is here: name, address, role, site. */
export function PersonFields({ register, errors, sites }: PersonFieldsProps) {
  return (
    <>
      <TextField
        label="Name"
        autoComplete="off"
        maxLength={200}
        error={errors.name?.message}
        {...register("name")}
      />
      <TextField
        label="E-mail address"
        type="email"
        autoComplete="off"
        maxLength={200}
        help="The person signs in with it, and mails go there."
        error={errors.email?.message}
        {...register("email")}
      />
      <SelectField label="Role" error={errors.role?.message} {...register("role")}>
        {ROLES.map((role) => (
          <option key={role} value={role}>
            {role}: {ROLE_WORDS[role]}
          </option>
        ))}
      </SelectField>
      <SelectField
        label="Site"
        help="Mails about released work go to the technicians of the site, and to those of every site."
        error={errors.siteId?.message}
        {...register("siteId")}
      >
        <option value="">every site</option>
        {sites.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </SelectField>
    </>
  );
}
