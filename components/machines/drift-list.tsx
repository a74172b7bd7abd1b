import { findingKey } from "@/lib/domain/findings";
import { parameterDefinition } from "@/lib/domain/parameters";
import { LAYER_WORDS } from "@/lib/domain/readings";
import { onAxis } from "@/lib/review/axis-word";
import { gaugeScale } from "@/lib/review/gauge-scale";
import type { DriftItemView } from "@/lib/schemas/machines-read";
import { Gauge } from "@/components/charts/gauge";
import { gaugeReadingOf } from "@/components/findings/findings-box";
import { Limit } from "@/components/findings/limit";
import { LevelMark } from "@/components/ui/level-mark";
import { ParameterQuantity, Quantity, NoValue } from "@/components/ui/quantity";
import { Head, NumberCell, Table } from "@/components/ui/table";

type Item = DriftItemView;
type ItemConsequence = Item["consequences"][number];

function Value({ item, side }: { readonly item: Item; readonly side: "required" | "actual" }) {
  const value = item[side];
  return value === null ? <NoValue /> : <ParameterQuantity parameter={item.parameter} {...value} />;
}

function readingOf({ was, toBe }: ItemConsequence) {
  return gaugeReadingOf(toBe, was?.value ?? undefined);
}

function ConsequenceLine({ consequence, items }: { consequence: ItemConsequence; items: readonly Item[] }) {
  const { was, toBe } = consequence;
  const scale = gaugeScale(items.flatMap(({ consequences }) => consequences.map(readingOf)));
  return (
    <li className="flex flex-wrap items-center gap-x-4 gap-y-1 py-1">
      <LevelMark level={toBe.level} />
      <span>{toBe.sentence}</span>
      {toBe.value !== null && (
        <span className="whitespace-nowrap">
          {was?.value !== null && was !== null && (
            <>
              <Quantity value={was.value} unit={was.unit} /> →{" "}
            </>
          )}
          <Quantity value={toBe.value} unit={toBe.unit} />{" "}
          <Limit limit={toBe.limit} sense={toBe.limitSense} unit={toBe.unit} />
        </span>
      )}
      <Gauge reading={readingOf(consequence)} unit={toBe.unit} level={toBe.level} scale={scale} />
      {toBe.caution !== null && <span className="caution">{toBe.caution}</span>}
    </li>
  );
}

function Row({ item, items }: { readonly item: Item; readonly items: readonly Item[] }) {
  const { axis, parameter, layer, level, sentence, consequences } = item;
  return (
    <>
      <tr>
        <td>
          <LevelMark level={level} />
        </td>
        <th scope="row">{onAxis(axis, parameterDefinition(parameter).label.toLowerCase())}</th>
        <NumberCell>
          <Value item={item} side="required" />
        </NumberCell>
        <NumberCell>
          <Value item={item} side="actual" />
        </NumberCell>
        <td>{layer === null ? <span className="quiet">not read</span> : LAYER_WORDS[layer]}</td>
        <td>{sentence}</td>
      </tr>
      {consequences.length > 0 && (
        <tr className="row-note">
          <td />
          <td colSpan={5}>
            <ul aria-label="What it brings about">
              {consequences.map((consequence) => (
                <ConsequenceLine key={findingKey(consequence.toBe)} consequence={consequence} items={items} />
              ))}
            </ul>
          </td>
        </tr>
      )}
    </>
  );
}

/** Where a machine differs from what it requires, by physical consequence, each with what it brings about. */
export function DriftList({ items }: { readonly items: readonly Item[] }) {
  return (
    <Table caption="Differences from the required configuration" captionHidden>
      <thead>
        <tr>
          <Head>Level</Head>
          <Head>Parameter</Head>
          <Head number>Required</Head>
          <Head number>Counts</Head>
          <Head>Layer</Head>
          <Head>In words</Head>
        </tr>
      </thead>
      <tbody>
        {items.map((item) => (
          <Row key={`${item.axis ?? ""} ${item.parameter}`} item={item} items={items} />
        ))}
      </tbody>
    </Table>
  );
}
