"use client";

import { useQuery } from "@tanstack/react-query";
import { useDeferredValue, useId, useState } from "react";
import { apiCall } from "@/components/api";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import type { MachinePage } from "@/lib/schemas/machines-read";

/** A machine as a form needs it. */
export interface ChosenMachine {
  readonly id: string;
  readonly serial: string;
  readonly modelId: string;
  readonly modelName: string;
  readonly siteName: string;
}

export interface MachineChoiceProps {
  readonly chosen: ChosenMachine | null;
  readonly onChoose: (machine: ChosenMachine | null) => void;
  readonly error?: string | undefined;
  readonly optional?: boolean | undefined;
}

const SHOWN = 8;

function toChosen({ id, serial, model, site }: MachinePage["items"][number]): ChosenMachine {
  return { id, serial, modelId: model.id, modelName: model.name, siteName: site.name };
}

/** Finds a machine by part of its serial number. */
export function MachineChoice({ chosen, onChoose, error, optional }: MachineChoiceProps) {
  const [typed, setTyped] = useState("");
  const sought = useDeferredValue(typed.trim());
  const listId = useId();
  const found = useQuery({
    queryKey: ["machines", sought],
    enabled: sought !== "" && chosen === null,
    queryFn: ({ signal }) =>
      apiCall<MachinePage>("GET", `/machines?pageSize=${SHOWN}&q=${encodeURIComponent(sought)}`, { signal }),
  });
  if (chosen)
    return (
      <div className="field">
        <p className="field-legend">Machine</p>
        <p className="flex flex-wrap items-baseline gap-3">
          <strong>{chosen.serial}</strong>
          <span className="quiet">
            {chosen.modelName}, {chosen.siteName}
          </span>
          <Button variant="quiet" onClick={() => onChoose(null)}>
            choose another
          </Button>
        </p>
      </div>
    );
  const machines = sought === "" ? [] : (found.data?.items ?? []);
  return (
    <div>
      <TextField
        label="Machine"
        type="search"
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        help="Part of its serial number, then choose it below."
        autoComplete="off"
        optional={optional}
        aria-controls={listId}
        {...(error === undefined ? {} : { error })}
      />
      <ul id={listId} aria-live="polite" className="mb-4">
        {machines.map((machine) => (
          <li key={machine.id} className="py-1">
            <Button onClick={() => onChoose(toChosen(machine))}>
              {machine.serial}{" "}
              <span className="quiet">
                {machine.model.name}, {machine.site.name}
              </span>
            </Button>
          </li>
        ))}
        {sought !== "" && found.data?.items.length === 0 && (
          <li className="quiet">No machine has “{sought}” in its serial number.</li>
        )}
        {(found.data?.total ?? 0) > SHOWN && sought !== "" && (
          <li className="quiet">More machines answer to it; type more of the number.</li>
        )}
      </ul>
    </div>
  );
}
