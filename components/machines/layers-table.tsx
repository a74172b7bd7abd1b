import type { AxisKind } from "@/lib/domain/axis-kind";
import { parameterLabel } from "@/lib/domain/parameters";
import { LAYER_WORDS, LAYERS, type Layer } from "@/lib/domain/readings";
import type { LayerRow } from "@/lib/schemas/machines-read";
import { axisTitle, byAxis } from "@/components/findings/axis-title";
import { LevelMark } from "@/components/ui/level-mark";
import { NoValue, ParameterQuantity } from "@/components/ui/quantity";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { ParameterHistory } from "./parameter-history";

export interface LayersTableProps {
  readonly machineId: string;
  readonly rows: readonly LayerRow[];
  /** Layers with a standing reading; the others are not read. */
  readonly read: readonly Layer[];
  /** Kind by axis name in lower case. */
  readonly kinds: Readonly<Record<string, AxisKind>>;
}

function LayerCell({ row, layer }: { readonly row: LayerRow; readonly layer: Layer }) {
  const cell = row[layer];
  if (cell === null) return <NoValue />;
  const shown = <ParameterQuantity parameter={row.parameter} {...cell} />;
  return (
    <a href={`/readings/${cell.readingId}`} title={`${cell.path}, line ${cell.line}`}>
      {row.counts === layer ? <strong>{shown}</strong> : shown}
    </a>
  );
}

function Row({
  row,
  machineId,
  kinds,
}: { readonly row: LayerRow } & Pick<LayersTableProps, "machineId" | "kinds">) {
  const { axis, parameter, required, counts, level } = row;
  const label = parameterLabel(parameter, kinds[axis?.toLowerCase() ?? ""]);
  return (
    <tr>
      <th scope="row">{label}</th>
      <NumberCell>
        {required === null ? <NoValue /> : <ParameterQuantity parameter={parameter} {...required} />}
      </NumberCell>
      {LAYERS.map((layer) => (
        <NumberCell key={layer}>
          <LayerCell row={row} layer={layer} />
        </NumberCell>
      ))}
      <td>{counts === null ? <span className="quiet">not read</span> : LAYER_WORDS[counts]}</td>
      <td>{level && <LevelMark level={level} />}</td>
      <td>
        <ParameterHistory machineId={machineId} axis={axis} parameter={parameter} label={label} />
      </td>
    </tr>
  );
}

/** Three layers side by side: what is required, what each layer says, and which one counts. */
export function LayersTable({ machineId, rows, read, kinds }: LayersTableProps) {
  return (
    <>
      {byAxis(rows).map(({ axis, items }) => (
        <Table key={axis ?? ""} caption={axisTitle(axis)}>
          <thead>
            <tr>
              <Head>Parameter</Head>
              <Head number>Required</Head>
              {LAYERS.map((layer) => (
                <Head number key={layer}>
                  {LAYER_WORDS[layer]}
                  {!read.includes(layer) && <span className="quiet"> not read</span>}
                </Head>
              ))}
              <Head>Counts</Head>
              <Head>Level</Head>
              <Head>
                <span className="visually-hidden">History</span>
              </Head>
            </tr>
          </thead>
          <tbody>
            {items.map((row) => (
              <Row key={row.parameter} row={row} machineId={machineId} kinds={kinds} />
            ))}
          </tbody>
        </Table>
      ))}
    </>
  );
}
