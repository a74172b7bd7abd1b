"use client";

import { useId, useRef, useState, type DragEvent, type ReactNode } from "react";
import { Button } from "./button";
import { fileSize } from "./file-size";

export interface FileDropProps {
  readonly label: ReactNode;
  readonly files: readonly File[];
  readonly onChange: (files: File[]) => void;
  readonly multiple?: boolean | undefined;
  /** As the file input's `accept`. */
  readonly accept?: string | undefined;
  readonly help?: ReactNode;
  readonly error?: string | undefined;
}

/** Files by name: a second file of the same name takes the place of the first. */
export function addFiles(present: readonly File[], added: readonly File[], multiple: boolean): File[] {
  if (!multiple) return added.slice(0, 1);
  const names = new Set(added.map((file) => file.name));
  return [...present.filter((file) => !names.has(file.name)), ...added];
}

function FileList({ files, onRemove }: { files: readonly File[]; onRemove: (file: File) => void }) {
  if (files.length === 0) return null;
  return (
    <ul className="file-list">
      {files.map((file) => (
        <li key={file.name}>
          <span className="code">{file.name}</span>
          <span className="quiet">{fileSize(file.size)}</span>
          <Button variant="quiet" onClick={() => onRemove(file)} aria-label={`Leave out ${file.name}`}>
            leave out
          </Button>
        </li>
      ))}
    </ul>
  );
}

/** A place to drop files or to choose them; the whole of it is the label of the file input. */
export function FileDrop({ label, files, onChange, multiple = false, accept, help, error }: FileDropProps) {
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const take = (added: readonly File[]): void => {
    if (added.length > 0) onChange(addFiles(files, added, multiple));
    if (input.current) input.current.value = "";
  };
  const drop = (event: DragEvent): void => {
    event.preventDefault();
    setOver(false);
    take([...event.dataTransfer.files]);
  };
  return (
    <div className={error ? "field field-wrong" : "field"}>
      <label
        className={over ? "file-drop file-drop-over" : "file-drop"}
        htmlFor={id}
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={drop}
      >
        <span className="file-drop-label">{label}</span>
        <span className="file-drop-hint">
          Drop {multiple ? "files" : "a file"} here, or <span className="file-drop-choose">choose</span>
        </span>
        <input
          ref={input}
          id={id}
          type="file"
          multiple={multiple}
          accept={accept}
          aria-invalid={error ? true : undefined}
          aria-describedby={error ? `${id}-error` : help !== undefined ? `${id}-help` : undefined}
          onChange={(event) => take([...(event.target.files ?? [])])}
        />
      </label>
      <FileList files={files} onRemove={(gone) => onChange(files.filter((file) => file !== gone))} />
      {error && (
        <p className="field-error" id={`${id}-error`}>
          {error}
        </p>
      )}
      {help !== undefined && (
        <p className="field-help" id={`${id}-help`}>
          {help}
        </p>
      )}
    </div>
  );
}
