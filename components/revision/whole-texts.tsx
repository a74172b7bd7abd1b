"use client";

import DiffViewer, { DiffMethod, type ReactDiffViewerStylesOverride } from "react-diff-viewer-continued";
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
  wordAddedBackground: "var(--blueprint-wash)",
  wordRemovedBackground: "var(--copper-wash)",
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
  diffContainer: { minWidth: 0, pre: { ...FACE, whiteSpace: "pre-wrap", overflowWrap: "anywhere" } },
  contentText: FACE,
  marker: { display: "none" },
  wordAdded: { textDecoration: "underline", textUnderlineOffset: "3px" },
  wordRemoved: { textDecoration: "line-through" },
};

/** Both whole texts in one column, old lines before new ones, in the house's marks; needs script. */
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
        compareMethod={DiffMethod.WORDS_WITH_SPACE}
        styles={STYLES}
        {...(nonce === undefined ? {} : { nonce })}
      />
    </div>
  );
}
