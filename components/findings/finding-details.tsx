import type { ReactNode } from "react";
import type { Finding, ClearingValue } from "@/lib/domain/findings";
import { needWords } from "@/lib/domain/need-words";
import { parameterDefinition } from "@/lib/domain/parameters";
import { joinWords } from "@/lib/domain/sentences";
import { axisWord } from "@/lib/review/axis-word";
import { lineHref, type LineAnchors } from "@/components/revision/line-anchor";
import { Facts, type Fact } from "@/components/ui/facts";
import { Quantity } from "@/components/ui/quantity";
import { Limit } from "./limit";
import { marginWords } from "./margin-words";

/** "X run current 0.96 A" */
export function ClearingWords({ clearing }: { readonly clearing: ClearingValue }) {
  const label = parameterDefinition(clearing.parameter).label.toLowerCase();
  const words = clearing.axis === null ? label : `${axisWord(clearing.axis)} ${label}`;
  return (
    <>
      {words} <Quantity value={clearing.value} unit={clearing.unit} digits={4} />
    </>
  );
}

function Lines({ finding, anchors }: { finding: Finding; anchors: LineAnchors | undefined }) {
  return (
    <ul className="finding-lines">
      {finding.spans.map((span) => {
        const href = anchors ? lineHref(anchors, span.path, span.line) : null;
        const words = `${span.path}, line ${span.line}`;
        return (
          <li key={`${span.path}:${span.start}`}>
            {href === null ? words : <a href={href}>{words}</a>}:{" "}
            <span className="code">
              {span.key} = {span.raw}
            </span>
          </li>
        );
      })}
    </ul>
  );
}

function value(finding: Finding): ReactNode {
  if (finding.value === null) return "cannot be known";
  return <Quantity value={finding.value} unit={finding.unit} digits={4} />;
}

function factsOf(finding: Finding, anchors: LineAnchors | undefined): Fact[] {
  const { limit, limitSense: sense, unit } = finding;
  const margin = marginWords(finding);
  const facts: Fact[] = [{ label: "Value", value: value(finding) }];
  if (limit !== null)
    facts.push({ label: "Limit", value: <Limit limit={limit} sense={sense} unit={unit} /> });
  if (margin !== null) facts.push({ label: "Margin", value: margin });
  if (finding.formula !== "")
    facts.push({ label: "Formula", value: <span className="code">{finding.formula}</span> });
  facts.push({ label: "Source", value: finding.source });
  if (finding.spans.length > 0)
    facts.push({ label: "In the text", value: <Lines finding={finding} anchors={anchors} /> });
  if (finding.assumed.length > 0)
    facts.push({
      label: "Assumed",
      value: joinWords(finding.assumed.map((path) => needWords(path).words)),
      note: "Not known; the usual default was used.",
    });
  return facts;
}

/** What a finding rests on: value, limit, margin, formula with the numbers put in, source, lines, assumptions. */
export function FindingDetails({
  finding,
  anchors,
}: {
  readonly finding: Finding;
  readonly anchors: LineAnchors | undefined;
}) {
  return <Facts facts={factsOf(finding, anchors)} />;
}
