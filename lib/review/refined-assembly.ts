import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import type { RefinedField } from "@/lib/domain/refined";

/** A refined value of one axis, as it is kept for a machine. */
export interface RefinedOfAxis extends RefinedField {
  readonly axis: string;
}

/**
 * The assembly with thermal resistances refined by measured temperatures: the upper end of each 95 % interval, K/W, so
 * that what is not known of it counts against the motor and never for it. One whose catalog value is no longer what the
 * motor has (another motor, other data, a value recorded on the machine itself) is left out.
 */
export function withRefined(assembly: Assembly, refined: readonly RefinedOfAxis[]): Assembly {
  if (refined.length === 0) return assembly;
  return { ...assembly, axes: assembly.axes.map((axis) => refineAxis(axis, refined)) };
}

function refineAxis(axis: AxisAssembly, refined: readonly RefinedOfAxis[]): AxisAssembly {
  const own = refined.filter(
    (one) => one.axis.toLowerCase() === axis.axis.toLowerCase() && axis.motor?.[one.field] === one.catalog,
  );
  if (own.length === 0) return axis;
  const values = Object.fromEntries(own.map(({ field, high }) => [field, high]));
  return {
    ...axis,
    motor: { ...axis.motor, ...values },
    refined: own.map(({ axis: _, ...field }) => field),
  };
}

/** The same hardware with the catalog's thermal resistances, as it would be had nothing been measured on it. */
export function withoutRefined(assembly: Assembly): Assembly {
  return { ...assembly, axes: assembly.axes.map(asInCatalog) };
}

function asInCatalog({ refined, ...axis }: AxisAssembly): AxisAssembly {
  if (refined === undefined) return axis;
  const values = Object.fromEntries(refined.map(({ field, catalog }) => [field, catalog]));
  return { ...axis, motor: { ...axis.motor, ...values } };
}
