import "server-only";
import { QueryTypes } from "sequelize";
import { columnKey, type FloorColumn } from "@/lib/domain/floor";
import { parameterDefinition, parameterRank, type ParameterName } from "@/lib/domain/parameters";
import { sequelize } from "@/lib/server/sequelize";

interface Place {
  readonly modelId: string;
  readonly axis: string | null;
  readonly parameter: ParameterName;
}

/** What the machines of some models are required to have: the parameters of the baselines in force on them. */
const REQUIRED = `
  select distinct m.model_id as "modelId", p.axis, p.parameter
  from machine_baselines mb
  join machines m on m.id = mb.machine_id
  join baselines b on b.id = mb.baseline_id
  join revision_parameters p on p.revision_id = b.revision_id
  where m.model_id = any($1::uuid[]) and mb.from_at <= $2 and (mb.until_at is null or mb.until_at > $2)`;

/** Axes of the models as designed: those with a letter of ISO 841 in its order, the others after them in their model's. */
const AXES = `
  select a.axis, min(a.position)::int as position
  from axes a
  join machine_model_versions v on v.id = a.model_version_id
  join machine_models mm on mm.id = v.model_id and mm.version = v.version
  where mm.id = any($1::uuid[])
  group by a.axis
  order by nullif(strpos('xyzabcuvw', lower(substring(a.axis from '^[A-Za-z]\\d?$')::char(1))), 0) nulls last, 2, 1`;

interface Asked {
  readonly modelIds: readonly string[];
  readonly asOf: Date;
  /** Keys of cells that are shown: what is off may be required by nothing. */
  readonly cellKeys: readonly { readonly modelId: string; readonly key: string }[];
}

/** Columns of the floor: every parameter that is required of one of these models or off on one of their machines. */
export async function floorColumns({ modelIds, asOf, cellKeys }: Asked): Promise<FloorColumn[]> {
  const required = await sequelize.query<Place>(REQUIRED, {
    type: QueryTypes.SELECT,
    bind: [modelIds, asOf],
  });
  const axes = await sequelize.query<{ axis: string }>(AXES, { type: QueryTypes.SELECT, bind: [modelIds] });
  const names = new Map<string, string>();
  for (const { axis } of axes) if (!names.has(axis.toLowerCase())) names.set(axis.toLowerCase(), axis);
  const columns = new Map<string, { place: Place; modelIds: Set<string> }>();
  for (const place of [...required, ...cellKeys.flatMap(({ modelId, key }) => placeOf(modelId, key))]) {
    const key = columnKey(place.axis, place.parameter);
    const column = columns.get(key) ?? { place, modelIds: new Set() };
    column.modelIds.add(place.modelId);
    columns.set(key, column);
  }
  return [...columns.values()].map((column) => toColumn(column, names)).sort(byPlace([...names.keys()]));
}

function placeOf(modelId: string, key: string): Place[] {
  const dot = key.lastIndexOf(".");
  if (dot < 0) return [];
  return [{ modelId, axis: key.slice(0, dot) || null, parameter: key.slice(dot + 1) as ParameterName }];
}

function toColumn(
  { place, modelIds }: { place: Place; modelIds: ReadonlySet<string> },
  names: ReadonlyMap<string, string>,
): FloorColumn {
  const axis = place.axis === null ? null : (names.get(place.axis.toLowerCase()) ?? place.axis);
  const { parameter } = place;
  const { short, label } = parameterDefinition(parameter);
  return {
    key: columnKey(axis, parameter),
    axis,
    parameter,
    short,
    label,
    modelIds: [...modelIds],
  };
}

/** By axis as the models have them, the machine's own last, then in the order of the parameter list. */
function byPlace(axes: readonly string[]): (a: FloorColumn, b: FloorColumn) => number {
  const rank = ({ axis }: FloorColumn) => {
    if (axis === null) return axes.length + 1;
    const at = axes.indexOf(axis.toLowerCase());
    return at < 0 ? axes.length : at;
  };
  return (a, b) =>
    rank(a) - rank(b) ||
    (a.axis ?? "").localeCompare(b.axis ?? "") ||
    parameterRank(a.parameter) - parameterRank(b.parameter);
}
