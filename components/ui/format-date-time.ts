const FORMATS = new Map<string, Intl.DateTimeFormat>();

function formatOf(timeZone: string): Intl.DateTimeFormat {
  const known = FORMATS.get(timeZone);
  if (known) return known;
  const made = new Intl.DateTimeFormat("en", {
    timeZone,
    hourCycle: "h23",
    year: "numeric",
    month: "2-digit",
    day: "2-digit",
    hour: "2-digit",
    minute: "2-digit",
    timeZoneName: "longOffset",
  });
  FORMATS.set(timeZone, made);
  return made;
}

export interface ShownDateTime {
  /** 2026-11-30 */
  readonly date: string;
  /** 09:40 */
  readonly time: string;
  /** UTC, UTC+12:45 */
  readonly zone: string;
}

/** An instant as a calendar date and a time of day (ISO 8601 order) in a time zone of the IANA list. */
export function formatDateTime(instant: Date, timeZone: string): ShownDateTime {
  const parts = Object.fromEntries(
    formatOf(timeZone)
      .formatToParts(instant)
      .map(({ type, value }) => [type, value]),
  );
  return {
    date: `${parts.year?.padStart(4, "0")}-${parts.month}-${parts.day}`,
    time: `${parts.hour}:${parts.minute}`,
    zone: (parts.timeZoneName ?? "").replace(/^GMT(?:[+-]00:00)?|^$/, "UTC"),
  };
}
