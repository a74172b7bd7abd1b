import { computedFor } from "./calculations";
import { NOT_USED } from "./not-used";
import { ROWS } from "./rows";
import type { PublishedRow } from "./rows";

/** One value of a row beside what this project computes. */
export interface Comparison {
  readonly name: string;
  readonly expected: number | boolean;
  readonly computed: number | boolean | undefined;
  readonly allowed: number;
  /** Share of the expected value; of 0 and of yes or no, the difference itself. */
  readonly deviation: number;
}

export function comparisons(row: PublishedRow): Comparison[] {
  const results = computedFor(row);
  const { rel = 0, abs = 0 } = row.tolerance;
  return Object.entries(row.expected).map(([name, expected]) => {
    const computed = results[name];
    const difference = Math.abs(Number(computed) - Number(expected));
    const size = typeof expected === "boolean" || expected === 0 ? 1 : Math.abs(expected);
    return {
      name,
      expected,
      computed,
      allowed: Math.max(rel * Math.abs(Number(expected)), abs),
      deviation: difference / size,
    };
  });
}

/** A deviation in per cent, two digits; what the arithmetic's last bits make is none. */
function inPercent(share: number): string {
  if (share < 1e-9) return "0 %";
  return `${Number((share * 100).toPrecision(2))} %`;
}

function topicOf(topic: string) {
  const rows = ROWS.filter((row) => row.topic === topic);
  const all = rows.flatMap(comparisons);
  const counted = (confirmed: PublishedRow["confirmed"]) =>
    rows.filter((row) => row.confirmed === confirmed).length;
  return {
    topic: topic.replace(/^\d+ /, ""),
    rows: rows.length,
    values: all.length,
    lookedUp: counted("looked up"),
    fromMemory: counted("from memory"),
    derived: counted("derived"),
    largestDeviation: inPercent(Math.max(...all.map(({ deviation }) => deviation))),
    sources: [...new Set(rows.map(({ source }) => source))],
  };
}

/** What the page of the checks shows of the published values, topic by topic. */
export function publishedSummary() {
  const topics = [...new Set(ROWS.map(({ topic }) => topic))].sort((a, b) => parseInt(a) - parseInt(b));
  return { topics: topics.map(topicOf), notUsed: NOT_USED };
}
