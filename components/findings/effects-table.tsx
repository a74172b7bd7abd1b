import { joinWords } from "@/lib/domain/sentences";
import { needWords } from "@/lib/domain/need-words";
import { gaugeScale, type GaugeReading, type GaugeScale } from "@/lib/review/gauge-scale";
import type { Effect } from "@/lib/review/types";
import { Gauge } from "@/components/charts/gauge";
import { GaugeKey } from "@/components/charts/gauge-key";
import { LevelMark } from "@/components/ui/level-mark";
import { Quantity } from "@/components/ui/quantity";
import { RevisionMarks } from "@/components/ui/revision-mark";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { axisTitle, byAxis } from "./axis-title";
import { Limit } from "./limit";

export interface EffectsTableProps {
  readonly effects: readonly Effect[];
}

function readingOf(effect: Effect): GaugeReading {
  const { toBe: value, was: before, limit, nearLimit, limitSense: sense } = effect;
  return { value, before, limit, nearLimit, sense };
}

function Drawing({ effect, scale }: { effect: Effect; scale: GaugeScale }) {
  if (effect.toBe !== null)
    return (
      <Gauge
        reading={readingOf(effect)}
        unit={effect.unit}
        level={effect.levelToBe ?? "within"}
        scale={scale}
      />
    );
  if (effect.missing.length === 0) return <span className="quiet">not known</span>;
  return (
    <span className="quiet">{joinWords(effect.missing.map((path) => needWords(path).words))}: not known</span>
  );
}

function Row({ effect, scale }: { effect: Effect; scale: GaugeScale }) {
  return (
    <tr role="row">
      <td role="cell" className="letters">
        <RevisionMarks letters={effect.letters} />
      </td>
      <th scope="row" role="rowheader">
        {effect.label}
      </th>
      <NumberCell role="cell" className="was" data-label="was">
        <Quantity value={effect.was} unit={effect.unit} />
      </NumberCell>
      <NumberCell role="cell" className="to-be" data-label="to be">
        <Quantity value={effect.toBe} unit={effect.unit} />
      </NumberCell>
      <NumberCell role="cell" className="limit-cell" data-label={effect.limit === null ? undefined : "limit"}>
        <Limit limit={effect.limit} sense={effect.limitSense} unit={effect.unit} />
      </NumberCell>
      <td role="cell" className="gauge-cell">
        <Drawing effect={effect} scale={scale} />
      </td>
      <td role="cell" className="level-cell">
        {effect.levelToBe && <LevelMark level={effect.levelToBe} />}
      </td>
    </tr>
  );
}

/**
 * What a change does physically, before and after against its limit; one table an axis. On a phone each row is set as
 * a block, so the parts say their role themselves.
 */
export function EffectsTable({ effects }: EffectsTableProps) {
  return (
    <>
      {byAxis(effects).map(({ axis, items }) => {
        const scale = gaugeScale(items.map(readingOf));
        const where = axis === null ? "the machine" : `the ${axisTitle(axis)}`;
        return (
          <Table key={axis ?? ""} caption={`Effects on ${where}`} className="effects">
            <thead role="rowgroup">
              <tr role="row">
                <td role="cell" className="letters" />
                <Head role="columnheader">Effect</Head>
                <Head role="columnheader" number className="was-head">
                  Was
                </Head>
                <Head role="columnheader" number className="to-be-head">
                  To be
                </Head>
                <Head role="columnheader" number>
                  Limit
                </Head>
                <Head role="columnheader" className="gauge-cell">
                  <GaugeKey />
                </Head>
                <Head role="columnheader">Level</Head>
              </tr>
            </thead>
            <tbody role="rowgroup">
              {items.map((effect) => (
                <Row key={effect.quantity} effect={effect} scale={scale} />
              ))}
            </tbody>
          </Table>
        );
      })}
    </>
  );
}
