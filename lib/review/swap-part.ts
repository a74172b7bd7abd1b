import type { HardwareFact, ModelAxis, ModelHardware } from "@/lib/domain/catalog";

export interface PartSwap {
  readonly part: "motor" | "driver";
  /** Catalog item to be fitted. */
  readonly itemId: string;
  /** Only where this item is fitted now; null: wherever a part of the kind is. */
  readonly replacesId: string | null;
}

export interface RecordedHardware {
  readonly model: ModelHardware;
  /** The machine's own, oldest first; a later fact of the same part wins. */
  readonly facts: readonly HardwareFact[];
}

export interface SwappedHardware extends RecordedHardware {
  /** Axes on which the part is another now; empty where the machine does not carry what is to be replaced. */
  readonly axes: readonly string[];
}

/**
 * A machine's hardware with another motor or driver fitted. What was measured on the part that leaves goes with it; a
 * sense resistor recorded for the machine stays, for it sits on the board and not in the part.
 */
export function swapPart({ model, facts }: RecordedHardware, swap: PartSwap): SwappedHardware {
  const swapped = model.axes.filter((axis) => isReplaced(fittedItem(axis, { facts, swap }), swap));
  const axes = swapped.map(({ axis }) => axis);
  const kept = facts.flatMap((fact) => (fact.part === swap.part ? keptOf(fact, model, axes) : [fact]));
  const fitted = model.axes.map((axis) =>
    axes.includes(axis.axis) ? { ...axis, [swap.part]: swap.itemId } : axis,
  );
  return { model: { ...model, axes: fitted }, facts: kept, axes };
}

function fittedItem(
  axis: ModelAxis,
  { facts, swap }: { readonly facts: readonly HardwareFact[]; readonly swap: PartSwap },
): string | null {
  const own = facts.filter(
    (fact) => fact.part === swap.part && fact.itemId !== null && holdsFor(fact, axis.axis),
  );
  return own.at(-1)?.itemId ?? axis[swap.part];
}

function isReplaced(fitted: string | null, { itemId, replacesId }: PartSwap): boolean {
  return fitted !== null && fitted !== itemId && (replacesId === null || fitted === replacesId);
}

function holdsFor({ axis }: HardwareFact, name: string): boolean {
  return axis === null || axis.toLowerCase() === name.toLowerCase();
}

/** A fact of the part as it still holds: on the axes where the part stays. */
function keptOf(fact: HardwareFact, model: ModelHardware, swapped: readonly string[]): HardwareFact[] {
  if (!swapped.some((axis) => holdsFor(fact, axis))) return [fact];
  const staying = model.axes.filter(({ axis }) => holdsFor(fact, axis) && !swapped.includes(axis));
  return staying.map(({ axis }) => ({ ...fact, axis }));
}
