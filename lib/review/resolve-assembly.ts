import {
  loadSchema,
  setPointSchema,
  type Assembly,
  type AxisAssembly,
  type Driver,
} from "@/lib/domain/assembly";
import {
  CATALOG_DATA,
  CATALOG_KIND_WORDS,
  type CatalogKind,
  type DifferingPart,
  type HardwareFact,
  type ModelAxis,
  type ModelHardware,
} from "@/lib/domain/catalog";
import { withRefined, type RefinedOfAxis } from "./refined-assembly";

/** The data of one version of a catalog item. */
export interface CatalogEntry {
  readonly kind: CatalogKind;
  readonly data: unknown;
}

export interface ResolveInput {
  readonly model: ModelHardware;
  /** Catalog items by id: those that the model names and those that the facts name. */
  readonly items: ReadonlyMap<string, CatalogEntry>;
  /** The machine's own recorded hardware, oldest first; a later fact of the same part wins. */
  readonly facts: readonly HardwareFact[];
  readonly site: { readonly ambient_c: number | null };
  /** Thermal resistances refined by temperatures measured on the machine. */
  readonly refined?: readonly RefinedOfAxis[] | undefined;
}

interface Evidence {
  readonly path: string;
  readonly evidence: string;
}

interface Ignored {
  readonly path: string;
  readonly reason: string;
}

export interface ResolvedAssembly {
  readonly assembly: Assembly;
  /** What the machine has of its own, with its evidence; paths as in a finding's `needs`. */
  readonly evidence: readonly Evidence[];
  /** Recorded data that no field takes or whose field refuses the value: not used, and said. */
  readonly ignored: readonly Ignored[];
}

type Fields = Record<string, unknown>;

interface Desk {
  readonly input: ResolveInput;
  readonly evidence: Evidence[];
  readonly ignored: Ignored[];
}

/**
 * The hardware that counts for one machine: its own recorded hardware over its model's. A fact with an item puts that
 * item in the place of the model's; its data then overlay single fields (`set_point.gain` reaches into the set-point).
 * A sense resistor belongs to the set-point of whichever driver is fitted. A fact without an axis about a part of the
 * axes holds for every axis.
 */
export function resolveAssembly(input: ResolveInput): ResolvedAssembly {
  const desk: Desk = { input, evidence: [], ignored: [] };
  const { model, site } = input;
  const supply = fitted(desk, { part: "supply", axis: null, item: model.supply });
  const board = fitted(desk, { part: "controller_board", axis: null, item: model.controller_board });
  const assembly = {
    ambient_c: site.ambient_c ?? undefined,
    enclosure_rise_k: model.enclosure_rise_k,
    supply: supply && readFields(desk, { schema: CATALOG_DATA.supply, data: supply, path: "supply" }),
    controller_board:
      board &&
      readFields(desk, { schema: CATALOG_DATA.controller_board, data: board, path: "controller_board" }),
    axes: model.axes.map((axis) => resolveAxis(desk, axis)),
  };
  noteStrangers(desk);
  return {
    assembly: withRefined(withoutEmpty(assembly), input.refined ?? []),
    evidence: desk.evidence,
    ignored: desk.ignored,
  };
}

function resolveAxis(desk: Desk, own: ModelAxis): AxisAssembly {
  const { axis } = own;
  const path = `axes.${axis}`;
  const motor = fitted(desk, { part: "motor", axis, item: own.motor });
  const driveTrain = fitted(desk, { part: "drive_train", axis, item: own.drive_train });
  const mount = fitted(desk, { part: "mount", axis, item: own.mount });
  const load = overlaid(desk, { data: own.load, path: `${path}.load`, facts: factsOf(desk, "load", axis) });
  return withoutEmpty({
    axis,
    motor_count: own.motor_count,
    motor: motor && readFields(desk, { schema: CATALOG_DATA.motor, data: motor, path: `${path}.motor` }),
    driver: resolveDriver(desk, own),
    drive_train:
      driveTrain &&
      readFields(desk, { schema: CATALOG_DATA.drive_train, data: driveTrain, path: `${path}.drive_train` }),
    load: readFields(desk, { schema: loadSchema, data: load, path: `${path}.load` }),
    mount: mount && readFields(desk, { schema: CATALOG_DATA.mount, data: mount, path: `${path}.mount` }),
    travel_mm: own.travel_mm,
    travel_deg: own.travel_deg,
    coupled_with: own.coupled_with,
  });
}

function resolveDriver(desk: Desk, { axis, driver: item }: ModelAxis): Driver | undefined {
  const path = `axes.${axis}.driver`;
  const driver = fitted(desk, { part: "driver", axis, item });
  const facts = factsOf(desk, "sense_resistor", axis);
  if (!driver && facts.length === 0) return undefined;
  const { set_point: setPoint, ...rest } = driver ?? {};
  const known = setPoint === undefined && facts.length === 0 ? undefined : asFields(setPoint);
  const setPointPath = `${path}.set_point`;
  const sensed = known && overlaid(desk, { data: known, path: setPointPath, facts });
  return withoutEmpty({
    ...readFields(desk, { schema: CATALOG_DATA.driver, data: rest, path }),
    set_point: sensed && readFields(desk, { schema: setPointSchema, data: sensed, path: setPointPath }),
  });
}

interface PartPlace {
  readonly part: CatalogKind;
  readonly axis: string | null;
  readonly item: string | null;
}

/** The fields of a part as fitted on this machine, not yet read against its schema; undefined where nothing is known. */
function fitted(desk: Desk, { part, axis, item }: PartPlace): Fields | undefined {
  const path = axis === null ? part : `axes.${axis}.${part}`;
  let data = item === null ? undefined : catalogData(desk, { id: item, kind: part, path });
  for (const fact of factsOf(desk, part, axis)) {
    const swapped =
      fact.itemId === null ? undefined : catalogData(desk, { id: fact.itemId, kind: part, path });
    if (swapped) desk.evidence.push({ path, evidence: fact.evidence });
    data = swapped ?? data;
    if (Object.keys(fact.data).length > 0) data = overlaid(desk, { data: data ?? {}, path, facts: [fact] });
  }
  return data;
}

function catalogData(
  { input, ignored }: Desk,
  { id, kind, path }: { readonly id: string; readonly kind: CatalogKind; readonly path: string },
): Fields | undefined {
  const item = input.items.get(id);
  if (item?.kind === kind) return asFields(item.data);
  const { one } = CATALOG_KIND_WORDS[kind];
  ignored.push({ path, reason: `The ${one} that is named here is not in the catalog.` });
  return undefined;
}

interface Overlay {
  readonly data: Fields;
  readonly path: string;
  readonly facts: readonly HardwareFact[];
}

function overlaid(desk: Desk, { data, path, facts }: Overlay): Fields {
  let result = data;
  for (const fact of facts)
    for (const [field, value] of Object.entries(fact.data)) {
      desk.evidence.push({ path: `${path}.${field}`, evidence: fact.evidence });
      result = withField(result, field, value);
    }
  return result;
}

function withField(data: Fields, field: string, value: unknown): Fields {
  const inner = /^set_point\.(.+)$/.exec(field)?.[1];
  if (inner === undefined) return { ...data, [field]: value };
  return { ...data, set_point: { ...asFields(data.set_point), [inner]: value } };
}

function factsOf({ input }: Desk, part: DifferingPart, axis: string | null): HardwareFact[] {
  return input.facts.filter(
    (fact) =>
      fact.part === part &&
      (axis === null || fact.axis === null || fact.axis.toLowerCase() === axis.toLowerCase()),
  );
}

/** Facts about an axis that the model does not have. */
function noteStrangers({ input, ignored }: Desk): void {
  const axes = new Set(input.model.axes.map(({ axis }) => axis.toLowerCase()));
  for (const { axis, part } of input.facts)
    if (axis !== null && !axes.has(axis.toLowerCase()))
      ignored.push({ path: `axes.${axis}.${part}`, reason: `The model has no axis “${axis}”.` });
}

/** A stored schema as far as it is used here. */
interface Readable<T> {
  readonly shape: Readonly<Record<string, { readonly safeParse: (value: unknown) => { success: boolean } }>>;
  readonly parse: (value: unknown) => T;
}

interface ReadInput<T> {
  readonly schema: Readable<T>;
  readonly data: Fields;
  readonly path: string;
}

/** The fields that the schema takes; one bad field costs only itself. */
function readFields<T>(desk: Desk, { schema, data, path }: ReadInput<T>): T {
  const kept: [string, unknown][] = [];
  for (const [field, value] of Object.entries(data)) {
    if (value === undefined) continue;
    const known = Object.hasOwn(schema.shape, field) ? schema.shape[field] : undefined;
    const reason = !known
      ? "There is no such field."
      : known.safeParse(value).success
        ? null
        : `${JSON.stringify(value)} cannot be its value.`;
    if (reason === null) kept.push([field, value]);
    else desk.ignored.push({ path: `${path}.${field}`, reason });
  }
  return schema.parse(Object.fromEntries(kept));
}

function asFields(data: unknown): Fields {
  return typeof data === "object" && data !== null ? { ...data } : {};
}

/**
 * Without the keys whose value is undefined, so that equal hardware is equal data. The cast is safe: only optional keys
 * of T can hold undefined.
 */
function withoutEmpty<T extends object>(data: T): T {
  return Object.fromEntries(Object.entries(data).filter(([, value]) => value !== undefined)) as T;
}
