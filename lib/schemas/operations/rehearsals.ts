import { idParams } from "@/lib/schemas/common";
import { operation } from "@/lib/schemas/operation";
import {
  rehearsalMachinePageSchema,
  rehearsalMachineQuery,
  rehearsalPageSchema,
  rehearsalQuery,
  rehearsalViewSchema,
  startRehearsalSchema,
} from "@/lib/schemas/rehearsals";

const REHEARSALS = "Rehearsals";

export const rehearsalOperations = {
  listRehearsals: operation({
    id: "listRehearsals",
    method: "GET",
    path: "/rehearsals",
    action: "rehearsals.read",
    summary: "Rehearsals of the fleet, newest first",
    tag: REHEARSALS,
    query: rehearsalQuery,
    answer: rehearsalPageSchema,
  }),
  startRehearsal: operation({
    id: "startRehearsal",
    method: "POST",
    path: "/rehearsals",
    action: "rehearsals.start",
    summary: "Check the fleet in warmer rooms or with another part fitted, as a job; no machine is changed",
    tag: REHEARSALS,
    body: startRehearsalSchema,
    answer: rehearsalViewSchema,
    status: 201,
  }),
  showRehearsal: operation({
    id: "showRehearsal",
    method: "GET",
    path: "/rehearsals/{id}",
    action: "rehearsals.read",
    summary:
      "One rehearsal: what was asked, how far it has come, how many machines would be newly over limit",
    tag: REHEARSALS,
    params: idParams,
    answer: rehearsalViewSchema,
  }),
  listRehearsalMachines: operation({
    id: "listRehearsalMachines",
    method: "GET",
    path: "/rehearsals/{id}/machines",
    action: "rehearsals.read",
    summary: "Machines of a rehearsal by site, with what would be graver and the hottest room each tolerates",
    tag: REHEARSALS,
    params: idParams,
    query: rehearsalMachineQuery,
    answer: rehearsalMachinePageSchema,
  }),
} as const;
