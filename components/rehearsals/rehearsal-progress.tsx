"use client";

import { useQuery } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useEffect, useId } from "react";
import { apiCall } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import type { RehearsalView } from "@/lib/schemas/rehearsals";

/** ms between two looks at a job that runs. */
const LOOK_EVERY = 1000;

/** How far a rehearsal has come, looked at until it is done; the page then shows what it came to. */
export function RehearsalProgress({ rehearsal }: { readonly rehearsal: RehearsalView }) {
  const router = useRouter();
  const id = useId();
  const { data, error } = useQuery({
    queryKey: ["rehearsal", rehearsal.id],
    queryFn: ({ signal }) => apiCall<RehearsalView>("GET", `/rehearsals/${rehearsal.id}`, { signal }),
    initialData: rehearsal,
    initialDataUpdatedAt: 0,
    refetchInterval: ({ state }) => (state.data?.state === "done" ? false : LOOK_EVERY),
  });
  const done = data.state === "done";
  useEffect(() => {
    if (done) router.refresh();
  }, [done, router]);
  const { machines, rehearsed, newlyOver } = data;
  return (
    <div className="mb-4">
      <label htmlFor={id}>
        {rehearsed} of {machines} machines, {newlyOver} of them newly over limit so far
      </label>
      <progress id={id} className="block w-full" max={machines} value={rehearsed} />
      <p className="quiet">
        {data.state === "waiting" ? "It waits for the job before it." : "It goes on when this page is left."}
      </p>
      {error && <Refusal error={error} title="How far it is was not read" />}
    </div>
  );
}
