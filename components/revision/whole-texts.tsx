"use client";

import DiffViewer, { type ReactDiffViewerStylesOverride } from "react-diff-viewer-continued";
import { useNonce } from "@/components/shell/nonce";

export interface WholeTextsProps {
  readonly path: string;
  readonly was: string;
  readonly toBe: string;
}

/** The house's colours follow the scheme by themselves, so both of the library's themes get the same variables. */
const COLOUR_VARIABLES = {
  diffViewerBackground: "transparent",
  diffViewerColor: "var(--ink)",
  addedBackground: "transparent",
  addedColor: "var(--blueprint)",
  removedBackground: "transparent",
  removedColor: "var(--copper)",
  addedGutterBackground: "transparent",
  removedGutterBackground: "transparent",
  gutterBackground: "transparent",
  emptyLineBackground: "transparent",
  codeFoldBackground: "transparent",
  codeFoldGutterBackground: "transparent",
  codeFoldContentColor: "var(--grey)",
  gutterColor: "var(--grey)",
  addedGutterColor: "var(--blueprint)",
  removedGutterColor: "var(--copper)",
};

const FACE = { fontFamily: "var(--font-code)", fontSize: "13px", lineHeight: "22px" };

const STYLES: ReactDiffViewerStylesOverride = {
  variables: { light: COLOUR_VARIABLES, dark: COLOUR_VARIABLES },
  diffContainer: {
    width: "100%",
    minWidth: 0,
    pre: { ...FACE, whiteSpace: "pre-wrap", overflowWrap: "anywhere" },
  },
  contentText: FACE,
  diffRemoved: { textDecoration: "line-through" },
  diffAdded: { textDecoration: "underline", textUnderlineOffset: "3px" },
  marker: { paddingInline: 0, pre: { display: "none" } },
  content: { width: "100%" },
};

/** Both whole texts in one column, struck old lines before underlined new ones; needs script. */
export function WholeTexts({ path, was, toBe }: WholeTextsProps) {
  const nonce = useNonce();
  return (
    <div className="whole-texts" role="group" aria-label={`Both whole texts of ${path}`}>
      <DiffViewer
        oldValue={was}
        newValue={toBe}
        splitView={false}
        hideLineNumbers
        hideSummary
        showDiffOnly={false}
        disableWorker
        disableWordDiff
        styles={STYLES}
        {...(nonce === undefined ? {} : { nonce })}
      />
    </div>
  );
}
