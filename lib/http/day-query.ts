import "server-only";
import { z } from "zod";

/** A day of a page's address: its end in UTC, or now where that day is not over. */
export const daySchema = z.iso.date("Give a day as year, month and day.");

export function endOfDay(day: string | undefined, now: Date): string | undefined {
  if (day === undefined) return undefined;
  const end = new Date(`${day}T23:59:59.999Z`);
  return (end.getTime() > now.getTime() ? now : end).toISOString();
}
