import type { ReactNode } from "react";
import type { AxisKind } from "@/lib/domain/axis-kind";
import type { Finding } from "@/lib/domain/findings";
import { plural } from "@/lib/domain/sentences";
import type { ParameterValue } from "@/lib/domain/values";
import type { UnmappedKey } from "@/lib/keytable/types";
import type { CurrentProvenance } from "@/lib/rules/types";
import type { DocumentView } from "@/lib/schemas/check";
import { FindingsBox } from "@/components/findings/findings-box";
import { ParametersTable } from "@/components/findings/parameters-table";
import { ProvenanceStrip } from "@/components/findings/provenance-strip";
import { MarkedText } from "@/components/revision/marked-text";
import type { LineAnchors } from "@/components/revision/line-anchor";
import { SheetSection } from "@/components/ui/sheet";
import { BasisQuestions } from "./basis-questions";
import { DiagnosticsList } from "./diagnostics-list";
import { lineMarks, parameterLevels } from "./line-marks";
import { UnmappedKeys } from "./unmapped-keys";

/** What the checks make of some texts, kept or not. */
export interface CheckedData {
  readonly documents: readonly DocumentView[];
  readonly parameters: readonly ParameterValue[];
  readonly findings: readonly Finding[];
  readonly provenance: readonly CurrentProvenance[];
  readonly unmapped: readonly UnmappedKey[];
  readonly axes: readonly { readonly axis: string; readonly kind: AxisKind }[];
}

export interface CheckedTextsProps {
  readonly checked: CheckedData;
  readonly files: readonly { readonly path: string; readonly text: string }[];
  /** Whose key table is asked; null where nothing can be remembered. */
  readonly modelId: string | null;
  readonly mayMap: boolean;
  /** Beside the heading of a text: how to save it. */
  readonly fileActs?: readonly ReactNode[] | undefined;
  /** After the key table has learned something; left out: the page is loaded again. */
  readonly onLearned?: (() => void) | undefined;
}

function levelsNote(findings: readonly Finding[]): string {
  const of = (level: Finding["level"]) => findings.filter((finding) => finding.level === level).length;
  return `${of("over")} over limit, ${of("near")} near limit, ${of("cannot")} cannot check, ${of("within")} within limits`;
}

/** Findings, parameters, currents, unmapped keys and the texts themselves, tied by line numbers. */
export function CheckedTexts({ checked, files, modelId, mayMap, fileActs, onLearned }: CheckedTextsProps) {
  const { documents, parameters, findings, provenance, unmapped } = checked;
  const anchors: LineAnchors = { paths: files.map(({ path }) => path) };
  const kinds = Object.fromEntries(checked.axes.map(({ axis, kind }) => [axis.toLowerCase(), kind]));
  const hasNotices = documents.some(({ diagnostics }) => diagnostics.length > 0);
  return (
    <>
      {hasNotices && (
        <SheetSection title="Found in the text" id="notices">
          <DiagnosticsList documents={documents} anchors={anchors} />
        </SheetSection>
      )}
      {modelId !== null && (
        <BasisQuestions modelId={modelId} parameters={parameters} mayAnswer={mayMap} onAnswered={onLearned} />
      )}
      <SheetSection title="Findings" id="findings" note={levelsNote(findings)}>
        <FindingsBox
          findings={findings}
          label="Findings"
          anchors={anchors}
          empty="The checks had nothing to judge."
        />
      </SheetSection>
      <SheetSection title="Parameters" id="parameters" note={plural(parameters.length, "parameter")}>
        {parameters.length === 0 ? (
          <p>The key table reads no parameter out of this text.</p>
        ) : (
          <ParametersTable
            parameters={parameters}
            kinds={kinds}
            levels={parameterLevels(findings)}
            anchors={anchors}
          />
        )}
      </SheetSection>
      {provenance.length > 0 && (
        <SheetSection title="Currents" id="currents" note="From the number typed to the winding">
          {provenance.map((current) => (
            <ProvenanceStrip key={`${current.axis} ${current.parameter}`} provenance={current} />
          ))}
        </SheetSection>
      )}
      {unmapped.length > 0 && (
        <SheetSection title="Keys not mapped" id="unmapped" note={plural(unmapped.length, "key")}>
          <UnmappedKeys
            unmapped={unmapped}
            anchors={anchors}
            modelId={modelId}
            mayAccept={mayMap}
            onAccepted={onLearned}
          />
        </SheetSection>
      )}
      {files.map(({ path, text }, index) => (
        <SheetSection
          key={path}
          title={path}
          note={documents[index] && plural(documents[index].entries, "key")}
          acts={fileActs?.[index]}
        >
          <MarkedText text={text} path={path} index={index} marks={lineMarks(findings, path)} />
        </SheetSection>
      ))}
    </>
  );
}
