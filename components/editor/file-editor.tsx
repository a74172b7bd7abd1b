"use client";

import dynamic from "next/dynamic";
import { useState, useSyncExternalStore } from "react";
import type { Finding } from "@/lib/domain/findings";
import { Button } from "@/components/ui/button";
import { TextArea } from "@/components/ui/field";
import type { LineMark } from "@/components/revision/marked-text";

const TextEditor = dynamic(() => import("./text-editor").then((module) => module.TextEditor), {
  ssr: false,
  loading: () => <p className="quiet">Opening the editor …</p>,
});

export interface EditedFile {
  readonly path: string;
  readonly text: string;
}

export interface FileEditorProps {
  readonly files: readonly EditedFile[];
  /** Another number: the texts were replaced from outside, and the editor opens anew with them. */
  readonly edition: number;
  readonly findings: readonly Finding[];
  readonly goTo: { readonly path: string; readonly line: number } | null;
  /** Texts put in the place of the typed ones, as one act that the editor can undo; a new list each time. */
  readonly taken?: readonly EditedFile[] | null | undefined;
  readonly onChange: (path: string, text: string) => void;
}

const NARROW = "(max-width: 700px)";

function subscribe(changed: () => void): () => void {
  const query = matchMedia(NARROW);
  query.addEventListener("change", changed);
  return () => query.removeEventListener("change", changed);
}

/** Marks of one file: every finding that is not within limits, at each line it rests on. */
export function marksOf(findings: readonly Finding[], path: string): LineMark[] {
  return findings
    .filter(({ level }) => level !== "within")
    .flatMap(({ level, sentence, spans }) =>
      spans.filter((span) => span.path === path).map(({ line }) => ({ line, level, sentence })),
    );
}

/** The files of a proposal, one open at a time; a plain text field on a phone. */
export function FileEditor({ files, edition, findings, goTo, taken, onChange }: FileEditorProps) {
  const narrow = useSyncExternalStore(
    subscribe,
    () => matchMedia(NARROW).matches,
    () => false,
  );
  const [chosen, setChosen] = useState(files[0]?.path ?? "");
  const [followed, setFollowed] = useState(goTo);
  if (goTo !== followed) {
    setFollowed(goTo);
    if (goTo && files.some(({ path }) => path === goTo.path)) setChosen(goTo.path);
  }
  const open = files.find(({ path }) => path === chosen) ?? files[0];
  if (!open) return null;
  return (
    <>
      <FileNames files={files} chosen={open.path} onChoose={setChosen} />
      {narrow ? (
        <TextArea
          label={`Text of ${open.path}`}
          code
          rows={20}
          value={open.text}
          onChange={(event) => onChange(open.path, event.target.value)}
        />
      ) : (
        <div className="editor-frame">
          <TextEditor
            key={`${edition} ${open.path}`}
            path={open.path}
            startText={open.text}
            marks={marksOf(findings, open.path)}
            goTo={goTo?.path === open.path ? goTo : null}
            replacement={taken?.find(({ path }) => path === open.path)}
            onChange={(text) => onChange(open.path, text)}
          />
        </div>
      )}
    </>
  );
}

interface FileNamesProps {
  readonly files: readonly EditedFile[];
  readonly chosen: string;
  readonly onChoose: (path: string) => void;
}

function FileNames({ files, chosen, onChoose }: FileNamesProps) {
  if (files.length < 2) return <p className="code quiet">{chosen}</p>;
  return (
    <div className="acts" role="group" aria-label="Files">
      {files.map(({ path }) => (
        <Button
          key={path}
          variant={path === chosen ? "plain" : "quiet"}
          aria-pressed={path === chosen}
          onClick={() => onChoose(path)}
        >
          {path}
        </Button>
      ))}
    </div>
  );
}
