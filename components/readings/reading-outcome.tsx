"use client";

import Link from "next/link";
import { plural } from "@/lib/domain/sentences";
import type { CreatedReading } from "@/lib/schemas/readings";
import { StandingMark } from "@/components/floor/standing-mark";
import { Button, ButtonLink } from "@/components/ui/button";
import { LevelMark } from "@/components/ui/level-mark";
import { Notice } from "@/components/ui/notice";
import { DiagnosticsList } from "./diagnostics-list";

export interface ReadingOutcomeProps {
  readonly kept: CreatedReading;
  readonly onAnother: () => void;
}

/** What became of a reading: that it is kept, what the checks made of it, and where the machine stands with it. */
export function ReadingOutcome({ kept, onAnother }: ReadingOutcomeProps) {
  const { id, machineId, serial, unchanged, level, levels, parameters, unmapped, documents, machine, step } =
    kept;
  return (
    <Notice
      live="status"
      title={`Kept for ${serial}`}
      acts={
        <>
          <ButtonLink variant="primary" href={`/readings/${id}`}>
            See the reading
          </ButtonLink>
          <ButtonLink href={`/machines/${machineId}`}>See the machine</ButtonLink>
          <Button onClick={onAnother}>Add another layer</Button>
        </>
      }
    >
      <p>
        <StandingMark standing={machine.standing} /> {serial} stands: {machine.sentence}.
      </p>
      <p>
        <LevelMark level={level} /> {levels.over} over limit, {levels.near} near limit, {levels.cannot} cannot
        check, {levels.within} within limits.
      </p>
      <p>
        {plural(parameters, "parameter")} read, {plural(unmapped, "key")} not mapped.
        {unchanged && " The text is the same as in an earlier reading, so its content was not stored again."}
      </p>
      {step && (
        <p>
          <Link href={`/changes/${step.changeId}/machines/${machineId}`}>
            The step of the released change
          </Link>
          : {step.verifiedAt ? "verified on this machine." : (step.missing ?? "applied.")}
        </p>
      )}
      <DiagnosticsList documents={documents} anchors={{ paths: [] }} />
    </Notice>
  );
}
