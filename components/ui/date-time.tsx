"use client";

import { useSyncExternalStore } from "react";
import { formatDateTime } from "./format-date-time";

export interface DateTimeProps {
  /** ISO 8601, or a Date. */
  readonly value: string | Date;
  /** The date alone, in the reader's time zone. */
  readonly dateOnly?: boolean | undefined;
}

const never = (): (() => void) => () => undefined;
const readersZone = (): string => Intl.DateTimeFormat().resolvedOptions().timeZone;
const serversZone = (): string => "UTC";

/** An instant in the reader's own time zone, which is named; UTC until the page is awake. */
export function DateTime({ value, dateOnly = false }: DateTimeProps) {
  const zone = useSyncExternalStore(never, readersZone, serversZone);
  const instant = typeof value === "string" ? new Date(value) : value;
  const shown = formatDateTime(instant, zone);
  return (
    <time
      className="date-time"
      dateTime={instant.toISOString()}
      title={dateOnly ? `${shown.date} ${shown.time} ${shown.zone}` : undefined}
    >
      {shown.date}
      {!dateOnly && (
        <>
          {` ${shown.time}`}
          <span className="quantity-unit">{`\u00a0${shown.zone}`}</span>
        </>
      )}
    </time>
  );
}
