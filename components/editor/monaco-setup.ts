import { loader } from "@monaco-editor/react";
import type * as Monaco from "monaco-editor";
import * as monaco from "monaco-editor/editor.js";
import "monaco-editor/features/register.all.js";

/** The editor comes with the application: its worker is one of our own files and nothing is fetched elsewhere. */
self.MonacoEnvironment = {
  getWorker: () =>
    new Worker(new URL("monaco-editor/editor/editor.worker.js", import.meta.url), { type: "module" }),
};

// The trimmed entry has the same shape as the full one, which the loader's types name.
loader.config({ monaco: monaco as unknown as typeof Monaco });

function variable(name: string): string {
  return getComputedStyle(document.documentElement).getPropertyValue(name).trim();
}

/** The sheet's own colours, read when the editor opens, so that the dark scheme follows. */
export function defineTheme(): string {
  const dark = matchMedia("(prefers-color-scheme: dark)").matches;
  monaco.editor.defineTheme("keepstep", {
    base: dark ? "vs-dark" : "vs",
    inherit: true,
    rules: [],
    colors: {
      "editor.background": variable("--sheet"),
      "editor.foreground": variable("--ink"),
      "editorLineNumber.foreground": variable("--grey"),
      "editorLineNumber.activeForeground": variable("--ink"),
      "editor.lineHighlightBorder": variable("--hairline"),
    },
  });
  return "keepstep";
}
