"use client";

import { SelectField } from "@/components/ui/field";
import type { MachineView } from "@/lib/schemas/machines-write";
import type { NamedChoice } from "./machine-create-form";
import { ReasonedAct } from "./reasoned-act";

export interface MachineActsProps {
  readonly machine: MachineView;
  readonly sites: readonly NamedChoice[];
}

/** Move, take out of service, put into service, retire: each with its reason, each undone by another. */
export function MachineActs({ machine, sites }: MachineActsProps) {
  const { id, state } = machine;
  const at = (act: string) => ({ path: `/machines/${id}/${act}` });
  const others = sites.filter((site) => site.id !== machine.siteId);
  return (
    <>
      {others.length > 0 && (
        <ReasonedAct
          {...at("move")}
          title="Move to another site"
          note="What it requires stays; it is checked again at the ambient temperature of that site. Moving it back undoes it."
          label="Move the machine"
        >
          {(errors) => (
            <SelectField label="Site" name="siteId" defaultValue="" error={errors.siteId}>
              <option value="">choose</option>
              {others.map(({ id: siteId, label }) => (
                <option key={siteId} value={siteId}>
                  {label}
                </option>
              ))}
            </SelectField>
          )}
        </ReasonedAct>
      )}
      {state !== "in_service" && (
        <ReasonedAct
          {...at("state")}
          body={{ state: "in_service" }}
          title="Put into service"
          note={
            state === "retired"
              ? "It comes back with what it required before. Read it before you trust what it runs."
              : "It counts on the floor again."
          }
          label="Put into service"
        />
      )}
      {state === "in_service" && (
        <ReasonedAct
          {...at("state")}
          body={{ state: "out_of_service" }}
          title="Take out of service"
          note="It stays on the floor and is said to be out of service."
          label="Take out of service"
        />
      )}
      {state !== "retired" && (
        <ReasonedAct
          {...at("retire")}
          title="Retire"
          note="It leaves the floor; its readings and its record stay. Putting it into service undoes it."
          label="Retire the machine"
        />
      )}
    </>
  );
}
