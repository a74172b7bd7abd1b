import type { AxisKind } from "@/lib/domain/axis-kind";
import type { Level } from "@/lib/domain/levels";
import { parameterLabel, parameterRank } from "@/lib/domain/parameters";
import { formatNumber } from "@/lib/domain/units";
import type { ParameterValue } from "@/lib/domain/values";
import { parameterKey } from "@/lib/review/axis-word";
import { lineHref, type LineAnchors } from "@/components/revision/line-anchor";
import { LevelMark } from "@/components/ui/level-mark";
import { ParameterQuantity } from "@/components/ui/quantity";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { axisTitle, byAxis } from "./axis-title";

export interface ParametersTableProps {
  readonly parameters: readonly ParameterValue[];
  /** Kind by axis name in lower case; left out: linear. */
  readonly kinds?: Readonly<Record<string, AxisKind>> | undefined;
  /** Gravest level by `parameterKey`, where a finding rests on the parameter. */
  readonly levels?: Readonly<Record<string, Level>> | undefined;
  readonly anchors?: LineAnchors | undefined;
}

type RowContext = Omit<ParametersTableProps, "parameters">;

/** "800 mA" as the text or the key table has it. */
function typed({ typed: { value, unit }, source }: ParameterValue): string {
  if (!Number.isFinite(value)) return source.raw;
  return unit === null ? formatNumber(value, 8) : `${formatNumber(value, 8)} ${unit}`;
}

function kindOf(parameter: ParameterValue, { kinds }: RowContext): AxisKind {
  return kinds?.[parameter.axis?.toLowerCase() ?? ""] ?? "linear";
}

function Row({ parameter, context }: { parameter: ParameterValue; context: RowContext }) {
  const { source } = parameter;
  const level = context.levels?.[parameterKey(parameter)];
  const href = context.anchors ? lineHref(context.anchors, source.path, source.line) : null;
  const several = (context.anchors?.paths.length ?? 0) > 1;
  const line = several ? `${source.path}:${source.line}` : String(source.line);
  return (
    <tr>
      <th scope="row">{parameterLabel(parameter.parameter, kindOf(parameter, context))}</th>
      <NumberCell>
        <ParameterQuantity {...parameter} />
      </NumberCell>
      <td>{level && level !== "within" && <LevelMark level={level} word={false} />}</td>
      <NumberCell className="quiet">{typed(parameter)}</NumberCell>
      <td className="code quiet">{source.key}</td>
      <NumberCell>
        {href === null ? (
          line
        ) : (
          <a href={href} aria-label={`line ${line}`}>
            {line}
          </a>
        )}
      </NumberCell>
    </tr>
  );
}

/** The parameters of a configuration by axis, with units, as typed, and the line they stand in. */
export function ParametersTable({ parameters, ...context }: ParametersTableProps) {
  return (
    <>
      {byAxis(parameters).map(({ axis, items }) => (
        <Table key={axis ?? ""} caption={axisTitle(axis)} className="parameters">
          <thead>
            <tr>
              <Head>Parameter</Head>
              <Head number>Value</Head>
              <td />
              <Head number>As typed</Head>
              <Head>Key</Head>
              <Head number>Line</Head>
            </tr>
          </thead>
          <tbody>
            {[...items]
              .sort((a, b) => parameterRank(a.parameter) - parameterRank(b.parameter))
              .map((parameter) => (
                <Row key={parameter.parameter} parameter={parameter} context={context} />
              ))}
          </tbody>
        </Table>
      ))}
    </>
  );
}
