"use client";

import { useId, useMemo } from "react";
import { Notice } from "@/components/ui/notice";
import { SheetSection } from "@/components/ui/sheet";
import { showText } from "@/lib/domain/units";
import { moveInput, moveStart, type MovedAxis } from "@/lib/review/virtual-move";
import type { AxisBasis } from "./types";
import { useVirtualMove, type MoveState } from "./use-virtual-move";
import { VirtualMoveForm } from "./virtual-move-form";
import { VirtualMoveReport } from "./virtual-move-report";

/** The axis moved in a simulation, with the numbers of its required configuration. */
export function VirtualMove({ basis }: { readonly basis: AxisBasis }) {
  const start = useMemo(() => moveStart(basis), [basis]);
  return (
    <SheetSection
      title="Virtual test move"
      id="virtual-move"
      note="simulated from the required configuration"
    >
      {start.ok ? (
        <Move model={start.model} />
      ) : (
        <Notice level="cannot">
          <p>The move cannot be simulated. {start.reason}</p>
        </Notice>
      )}
    </SheetSection>
  );
}

function Move({ model }: { readonly model: MovedAxis }) {
  const { state, start, stop } = useVirtualMove();
  const speed = model.kind === "rotary" ? "rad/s" : "m/s";
  return (
    <>
      <p className="mb-4">
        At most {showText(model.maxSpeed, speed)} and {showText(model.acceleration, `${speed}²`)}, against the
        load. Current, winding, supply, inertia and friction are those of the checks.
        {model.detentTorque === null && " The motor's detent torque is not known and left out."}
      </p>
      <VirtualMoveForm
        model={model}
        running={state.phase === "running"}
        onStart={(choice) => start(moveInput(model, choice))}
        onStop={stop}
      />
      <Progress state={state} />
      {state.phase === "done" && (
        <VirtualMoveReport report={state.report} kind={model.kind} radius={model.radius} />
      )}
      <p className="sheet-section-note">
        An estimate: ideal chopper, inductance without saturation, no iron loss, friction as one number,
        microsteps as a smooth sine. The test on the machine and a competent person decide.
      </p>
    </>
  );
}

/** How far the simulation is, or why it ended without a result. */
function Progress({ state }: { readonly state: MoveState }) {
  const id = useId();
  if (state.phase === "failed")
    return (
      <Notice live="alert" title="Not simulated">
        <p>{state.reason}</p>
      </Notice>
    );
  if (state.phase !== "running" && state.phase !== "stopped") return null;
  const percent = Math.floor(state.share * 100);
  return (
    <div className="my-4">
      <label htmlFor={id}>
        {state.phase === "running"
          ? `Simulating, ${percent} % done`
          : `Stopped at ${percent} %. Nothing is shown of an unfinished move; start it again to see the whole.`}
      </label>
      <progress id={id} className="block w-full" max={1} value={state.share} />
    </div>
  );
}
