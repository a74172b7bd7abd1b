"use client";

import Editor, { type OnMount } from "@monaco-editor/react";
import { useEffect, useRef, useState } from "react";
import { LEVEL_WORDS } from "@/lib/domain/levels";
import type { LineMark } from "@/components/revision/marked-text";
import { defineTheme } from "./monaco-setup";

export interface TextEditorProps {
  readonly path: string;
  /** What the editor opens with; from then on the text is its own, so that no answer of the page overtakes the typing. */
  readonly startText: string;
  readonly marks: readonly LineMark[];
  /** Line to put in sight and the cursor on; a new object each time it is asked for. */
  readonly goTo: { readonly line: number } | null;
  /** A text to put in the place of the present one, as one act that the editor can undo; a new object each time. */
  readonly replacement?: { readonly text: string } | null | undefined;
  readonly onChange: (text: string) => void;
}

type Instance = Parameters<OnMount>[0];

const OPTIONS = {
  minimap: { enabled: false },
  glyphMargin: true,
  fontFamily: "var(--font-code)",
  fontSize: 13,
  lineHeight: 22,
  scrollBeyondLastLine: false,
  automaticLayout: true,
  wordWrap: "off",
  renderWhitespace: "trailing",
  unicodeHighlight: { invisibleCharacters: true, ambiguousCharacters: true },
  accessibilitySupport: "auto",
  tabFocusMode: true,
  fixedOverflowWidgets: true,
  scrollbar: { alwaysConsumeMouseWheel: false },
} as const;

/** Changes the lines that differ and leaves the rest of the text, the cursor and the way back alone. */
function replaceText(editor: Instance, text: string): void {
  const model = editor.getModel();
  if (!model || model.getValue() === text) return;
  const was = model.getValue();
  let from = 0;
  while (from < was.length && was[from] === text[from]) from++;
  let behind = 0;
  const most = Math.min(was.length, text.length) - from;
  while (behind < most && was[was.length - 1 - behind] === text[text.length - 1 - behind]) behind++;
  const [start, end] = [model.getPositionAt(from), model.getPositionAt(was.length - behind)];
  editor.pushUndoStop();
  editor.executeEdits("counter-proposal", [
    {
      range: {
        startLineNumber: start.lineNumber,
        startColumn: start.column,
        endLineNumber: end.lineNumber,
        endColumn: end.column,
      },
      text: text.slice(from, text.length - behind),
    },
  ]);
  editor.pushUndoStop();
}

/** Monaco with a level mark beside each line that a finding rests on. Tab leaves it (Ctrl+M changes that). */
export function TextEditor({ path, startText, marks, goTo, replacement, onChange }: TextEditorProps) {
  const [editor, setEditor] = useState<Instance | null>(null);
  const marking = useRef<ReturnType<Instance["createDecorationsCollection"]> | null>(null);
  useEffect(() => {
    if (!editor) return;
    marking.current ??= editor.createDecorationsCollection();
    marking.current.set(
      marks.map(({ line, level, sentence }) => ({
        range: { startLineNumber: line, startColumn: 1, endLineNumber: line, endColumn: 1 },
        options: {
          glyphMarginClassName: `glyph glyph-${level}`,
          glyphMarginHoverMessage: { value: `${LEVEL_WORDS[level]}: ${sentence}` },
        },
      })),
    );
  }, [editor, marks]);
  useEffect(() => {
    if (!editor || !goTo) return;
    editor.revealLineInCenter(goTo.line);
    editor.setPosition({ lineNumber: goTo.line, column: 1 });
    editor.focus();
  }, [editor, goTo]);
  const [opened] = useState(replacement);
  useEffect(() => {
    // The text that the editor opened with has it already.
    if (editor && replacement && replacement !== opened) replaceText(editor, replacement.text);
  }, [editor, replacement, opened]);
  return (
    <Editor
      height="min(70vh, 640px)"
      path={path}
      defaultLanguage="plaintext"
      defaultValue={startText}
      beforeMount={defineTheme}
      theme="keepstep"
      options={{ ...OPTIONS, ariaLabel: `Text of ${path}. Press Ctrl+M to let Tab move inside the text.` }}
      loading={<p className="quiet">Opening the editor …</p>}
      onMount={(opened) => {
        marking.current = null;
        setEditor(opened);
      }}
      onChange={(changed) => onChange(changed ?? "")}
    />
  );
}
