import { axisWord } from "@/lib/review/axis-word";

/** "X axis", "Turret axis", or "Machine" for what belongs to no axis. */
export function axisTitle(axis: string | null): string {
  return axis === null ? "Machine" : `${axisWord(axis)} axis`;
}

/** Items by axis in order of first appearance, the machine's last; axis names match without regard to case. */
export function byAxis<T extends { readonly axis: string | null }>(
  items: readonly T[],
): { readonly axis: string | null; readonly items: T[] }[] {
  const groups = new Map<string, { axis: string | null; items: T[] }>();
  for (const item of items) {
    const key = item.axis?.toLowerCase() ?? "";
    const group = groups.get(key) ?? { axis: item.axis, items: [] };
    group.items.push(item);
    groups.set(key, group);
  }
  return [...groups.values()].sort((a, b) => Number(a.axis === null) - Number(b.axis === null));
}
