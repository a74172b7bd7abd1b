import "server-only";
import { parameterRank } from "@/lib/domain/parameters";
import type { ParameterValue } from "@/lib/domain/values";
import { parameterKey } from "@/lib/review/axis-word";
import type { CountedValue, LayerValue } from "@/lib/review/standing";
import type { LayerRow } from "@/lib/schemas/machines-read";
import type { MachineCondition } from "./condition";
import { presentValue } from "./present-drift";

/** Every parameter that is required or was read, with what each layer says of it; by axis as the machine has them. */
export function layerRows({ requiredReport, counted, drift, hardware }: MachineCondition): LayerRow[] {
  const required = new Map((requiredReport?.parameters ?? []).map((value) => [parameterKey(value), value]));
  const read = new Map(counted.map((value) => [parameterKey(value), value]));
  const levels = new Map((drift?.items ?? []).map((item) => [parameterKey(item), item.level]));
  const axes = hardware.assembly.axes.map(({ axis }) => axis.toLowerCase());
  const place = ({ axis }: LayerRow) => (axis === null ? axes.length : axes.indexOf(axis.toLowerCase()));
  return [...new Set([...required.keys(), ...read.keys()])]
    .flatMap((key) => rowOf(required.get(key), read.get(key), levels.get(key) ?? null))
    .sort((a, b) => place(a) - place(b) || parameterRank(a.parameter) - parameterRank(b.parameter));
}

function rowOf(
  required: ParameterValue | undefined,
  read: CountedValue | undefined,
  level: LayerRow["level"],
): LayerRow[] {
  const known = required ?? read?.value;
  if (!known) return [];
  const of = (layer: LayerValue["layer"]) => cellOf(read?.layers.find((value) => value.layer === layer));
  return [
    {
      axis: known.axis,
      parameter: known.parameter,
      required: required ? presentValue(required) : null,
      file: of("file"),
      stored: of("stored"),
      running: of("running"),
      counts: read?.layer ?? null,
      level,
    },
  ];
}

function cellOf(found: LayerValue | undefined): LayerRow["file"] {
  if (!found) return null;
  const { readingId, readAt, value } = found;
  const { path, line } = value.source;
  return { ...presentValue(value), readingId, readAt: readAt.toISOString(), path, line };
}
