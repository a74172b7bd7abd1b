"use client";

import type { SentText } from "./read-files";
import { CheckedTexts, type CheckedData } from "./checked-texts";

export interface CheckAnswerData extends CheckedData {
  readonly versions: { readonly rules: string; readonly policy: string };
}

export interface CheckOutcomeProps {
  readonly answer: CheckAnswerData;
  readonly files: readonly SentText[];
  readonly modelId: string;
  readonly mayMap: boolean;
  readonly onLearned: () => void;
}

/** Bytes as a person reads them here: UTF-8 where they are that, else Latin-1, as the server recognises them. */
function textOf(file: SentText): string {
  if ("text" in file) return file.text;
  const bytes = Uint8Array.from(atob(file.base64), (letter) => letter.charCodeAt(0));
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    return atob(file.base64);
  }
}

/** What the checks make of texts that are not kept. */
export function CheckOutcome({ answer, files, modelId, mayMap, onLearned }: CheckOutcomeProps) {
  return (
    <div role="region" aria-label="What the checks found" aria-live="polite" className="mt-8">
      <p>
        Checked and not kept, with check rules {answer.versions.rules} and policy {answer.versions.policy}.
      </p>
      <CheckedTexts
        checked={answer}
        files={files.map((file) => ({ path: file.path, text: textOf(file) }))}
        modelId={modelId}
        mayMap={mayMap}
        onLearned={onLearned}
      />
    </div>
  );
}
