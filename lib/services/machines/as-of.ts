import "server-only";
import type { Context } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";

/** The moment that was asked for; now where none was. What will be in force nobody knows yet. */
export function momentOf(context: Context, asOf: string | undefined): Date {
  const moment = asOf === undefined ? context.now : new Date(asOf);
  if (moment.getTime() > context.now.getTime())
    throw new ServiceError("invalid", "The moment asked for lies in the future. Give a time up to now.", {
      pointer: "/asOf",
    });
  return moment;
}
