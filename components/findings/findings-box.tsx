import type { ReactNode } from "react";
import { findingKey, type Finding } from "@/lib/domain/findings";
import { levelRank } from "@/lib/domain/levels";
import { needWords } from "@/lib/domain/need-words";
import { joinWords, plural } from "@/lib/domain/sentences";
import { findingSubject } from "@/lib/review/finding-words";
import type { GaugeReading, GaugeScale } from "@/lib/review/gauge-scale";
import { gaugeScale } from "@/lib/review/gauge-scale";
import { Gauge } from "@/components/charts/gauge";
import type { LineAnchors } from "@/components/revision/line-anchor";
import { LevelMark } from "@/components/ui/level-mark";
import { Quantity } from "@/components/ui/quantity";
import { RevisionMarks } from "@/components/ui/revision-mark";
import { ClearingWords, FindingDetails } from "./finding-details";
import { Limit } from "./limit";

type ByFinding<T> = Readonly<Record<string, T>>;

export interface FindingsBoxProps {
  readonly findings: readonly Finding[];
  /** Names the box for screen readers, e.g. "New findings". */
  readonly label: string;
  /** Letters of the changes that caused a finding, by `findingKey`. */
  readonly letters?: ByFinding<readonly string[]> | undefined;
  /** The value before the change, by `findingKey`; draws the open dot. */
  readonly before?: ByFinding<number> | undefined;
  /** What can be done about a finding, by `findingKey`, e.g. a button that puts the clearing value in. */
  readonly acts?: ByFinding<ReactNode> | undefined;
  /** Leads from a finding to its lines. */
  readonly anchors?: LineAnchors | undefined;
  /** Said where there is no finding. */
  readonly empty?: ReactNode;
}

export function gaugeReadingOf(finding: Finding, before: number | undefined): GaugeReading {
  const { value, limit, nearLimit, limitSense: sense } = finding;
  return { value, before, limit, nearLimit, sense };
}

interface RowContext extends Omit<FindingsBoxProps, "findings" | "label" | "empty"> {
  readonly scale: GaugeScale;
}

function Needs({ finding }: { finding: Finding }) {
  if (finding.needs.length === 0) return null;
  return (
    <p className="finding-needs">Missing: {joinWords(finding.needs.map((path) => needWords(path).words))}.</p>
  );
}

function Measure({ finding, context }: { finding: Finding; context: RowContext }) {
  if (finding.value === null) return <div className="finding-measure" />;
  const before = context.before?.[findingKey(finding)];
  return (
    <div className="finding-measure">
      <p>
        <Quantity value={finding.value} unit={finding.unit} />
        <Limit limit={finding.limit} sense={finding.limitSense} unit={finding.unit} />
      </p>
      <Gauge
        reading={gaugeReadingOf(finding, before)}
        unit={finding.unit}
        level={finding.level}
        scale={context.scale}
      />
    </div>
  );
}

function FindingRow({ finding, context }: { finding: Finding; context: RowContext }) {
  const key = findingKey(finding);
  return (
    <li className="finding">
      <LevelMark level={finding.level} />
      <div className="finding-words">
        <p className="finding-subject">{findingSubject(finding)}</p>
        <p>
          {finding.sentence} <RevisionMarks letters={context.letters?.[key] ?? []} />
        </p>
        <Needs finding={finding} />
        {finding.caution !== null && <p className="caution">{finding.caution}</p>}
        {finding.clearingValue && (
          <p className="finding-clearing">
            This alone would clear it: <ClearingWords clearing={finding.clearingValue} />
          </p>
        )}
        {context.acts?.[key] !== undefined && <div className="acts">{context.acts[key]}</div>}
        <details>
          <summary>Formula and source</summary>
          <FindingDetails finding={finding} anchors={context.anchors} />
        </details>
      </div>
      <Measure finding={finding} context={context} />
    </li>
  );
}

/** Findings in a ruled box, gravest first; those within limits fold into one line that opens on demand. */
export function FindingsBox({ findings, label, empty, ...rest }: FindingsBoxProps) {
  const sorted = [...findings].sort((a, b) => levelRank(a.level) - levelRank(b.level));
  const telling = sorted.filter(({ level }) => level !== "within");
  const within = sorted.filter(({ level }) => level === "within");
  const readings = findings.map((finding) => gaugeReadingOf(finding, rest.before?.[findingKey(finding)]));
  const context: RowContext = { ...rest, scale: gaugeScale(readings) };
  const row = (finding: Finding, index: number) => (
    <FindingRow key={`${findingKey(finding)}|${index}`} finding={finding} context={context} />
  );
  return (
    <div className="findings" role="group" aria-label={label}>
      {findings.length === 0 && <p className="findings-none">{empty ?? "No findings."}</p>}
      {telling.length > 0 && <ul>{telling.map(row)}</ul>}
      {within.length > 0 && (
        <details className="findings-within">
          <summary>
            <LevelMark level="within" word={false} /> {plural(within.length, "check")} within limits
          </summary>
          <ul>{within.map(row)}</ul>
        </details>
      )}
    </div>
  );
}
