import { formatNumber, showText } from "@/lib/domain/units";

/** A number with its unit as a technician reads it, four significant digits at most. */
export function show(value: number, unit: string): string {
  return showText(value, unit, 4);
}

/** A current with its basis. */
export function showRms(value: number): string {
  return `${show(value, "A")} rms`;
}

export function showPeak(value: number): string {
  return `${show(value, "A")} peak`;
}

/** A share of 1 in per cent, two significant digits. */
export function showPercent(share: number): string {
  return `${formatNumber(share * 100, 2)} %`;
}

/** A scale, 1/mm or 1/deg, in the words of the floor. */
export function showScale(value: number, unit: string): string {
  return `${plain(value)} ${unit.replace("1/", "steps/")}`;
}

/** A plain number, four significant digits at most. */
export function plain(value: number): string {
  return formatNumber(value, 4);
}
