"use client";

import { useRouter } from "next/navigation";
import { useEffect, useMemo, useState } from "react";
import { useMutation } from "@tanstack/react-query";
import { checkConfiguration } from "@/lib/review/check";
import { apiCall, ProblemError } from "@/components/api";
import { keepUnsent } from "@/components/changes/unsent";
import type { EditedFile } from "./file-editor";
import { forgetDraft, keepDraft } from "./kept-draft";
import type { EditedChange, ProposalFields, ProposalStartData } from "./proposal-types";
import { EMPTY_FIELDS } from "./proposal-types";
import { useLiveCheck } from "./use-live-check";

interface Brief {
  readonly id: string;
  readonly lockVersion: number;
}

interface Proposal {
  readonly start: ProposalStartData;
  readonly change: EditedChange | null;
}

const STARTING_FILE: EditedFile = { path: "motion.conf", text: "" };

/** Names the place where unsaved words are kept in this browser. */
function placeOf({ start, change }: Proposal): string {
  return change?.id ?? start.machine?.id ?? start.model.id;
}

function startingFiles({ start, change }: Proposal): readonly EditedFile[] {
  const files = change?.files ?? start.files;
  return files.length === 0 ? [STARTING_FILE] : files.map(({ path, text }) => ({ path, text }));
}

/** The state of the editor of a proposal: text, fields, live checks, what was kept here, and saving. */
export function useProposal(proposal: Proposal) {
  const { start, change } = proposal;
  const router = useRouter();
  const [files, setFiles] = useState(() => startingFiles(proposal));
  const [fields, setFields] = useState<ProposalFields>(change?.fields ?? EMPTY_FIELDS);
  const [touched, setTouched] = useState(false);
  const [edition, setEdition] = useState(0);
  const [taken, setTaken] = useState<readonly EditedFile[] | null>(null);
  const place = placeOf(proposal);
  const { keyTable, assembly, policy } = start;
  const answer = useLiveCheck({ base: start.files, files, keyTable, assembly, policy });
  const baseReport = useMemo(
    () =>
      start.files.length === 0
        ? null
        : checkConfiguration({ files: start.files, keyTable, assembly, policy }),
    [start.files, keyTable, assembly, policy],
  );
  useUnsaved({ touched, place, files, fields });
  const save = useMutation({
    mutationFn: (submit: boolean) => send({ start, change, files, fields, submit }),
    onSuccess: ({ id }) => {
      setTouched(false);
      forgetDraft(place);
      router.push(`/changes/${id}`);
      router.refresh();
    },
  });
  return {
    files,
    edition,
    fields,
    answer,
    baseReport,
    place,
    save,
    taken,
    edit: (path: string, text: string) => {
      setTouched(true);
      setFiles((present) => present.map((file) => (file.path === path ? { path, text } : file)));
    },
    take: (texts: readonly EditedFile[]) => {
      setTouched(true);
      const fresh = texts.map(({ path, text }) => ({ path, text }));
      setFiles(fresh);
      setTaken(fresh);
    },
    setFields: (next: ProposalFields) => {
      setTouched(true);
      setFields(next);
    },
    restore: (kept: { files: readonly EditedFile[]; fields: ProposalFields }) => {
      setTouched(true);
      setFiles(kept.files);
      setEdition((present) => present + 1);
      setFields({ ...EMPTY_FIELDS, ...kept.fields });
    },
  };
}

interface Unsaved {
  readonly touched: boolean;
  readonly place: string;
  readonly files: readonly EditedFile[];
  readonly fields: ProposalFields;
}

/** Keeps what is typed in this browser, and asks before the page is left with it. */
function useUnsaved({ touched, place, files, fields }: Unsaved): void {
  useEffect(() => {
    if (!touched) return;
    const timer = setTimeout(
      () => keepDraft(place, { files, fields: { ...fields }, at: new Date().toISOString() }),
      400,
    );
    const ask = (event: BeforeUnloadEvent): void => event.preventDefault();
    addEventListener("beforeunload", ask);
    return () => {
      clearTimeout(timer);
      removeEventListener("beforeunload", ask);
    };
  }, [touched, place, files, fields]);
}

interface Sent extends Proposal {
  readonly files: readonly EditedFile[];
  readonly fields: ProposalFields;
  readonly submit: boolean;
}

/** Saves the proposal and, where asked, hands it to those who decide. A draft that was saved stays saved. */
async function send({ start, change, files, fields, submit }: Sent): Promise<Brief> {
  const { deviationUntil, effectivity, note, ...words } = fields;
  const scope = start.machine ? { deviationUntil: deviationUntil || undefined } : { effectivity };
  const body = { ...words, ...scope, note, files };
  const target = start.machine ? { machineId: start.machine.id } : { modelId: start.model.id };
  const saved = change
    ? await apiCall<Brief>("PUT", `/changes/${change.id}`, { body, ifMatch: change.lockVersion })
    : await apiCall<Brief>("POST", "/changes", { body: { ...body, ...target } });
  if (!submit) return saved;
  try {
    return await apiCall<Brief>("POST", `/changes/${saved.id}/submit`, {
      body: {},
      ifMatch: saved.lockVersion,
    });
  } catch (error) {
    if (change || !(error instanceof ProblemError)) throw error;
    // The page of the draft is the place to submit it again; here a second try would make a second draft.
    keepUnsent(saved.id, error.message);
    return saved;
  }
}
