import { useId, type PointerEvent } from "react";
import { formatNumber } from "@/lib/domain/units";
import { placeIn, roundTicks, type Range } from "./trace-scale";

/** A line over time, or a band where low and high differ. */
export interface Trace {
  readonly name: string;
  readonly ink: "was" | "now";
  readonly low: readonly number[];
  readonly high: readonly number[];
}

export interface TraceChartProps {
  readonly title: string;
  readonly unit: string;
  /** s, one for each value of the traces, rising. */
  readonly times: readonly number[];
  readonly range: Range;
  readonly traces: readonly Trace[];
  /** Values beyond which, up and down, the chart is hatched. */
  readonly limit?: number | undefined;
  /** Index of the time that is read off. */
  readonly cursor: number;
  readonly onCursor: (index: number) => void;
  /** What the chart says at the cursor. */
  readonly reading: string;
}

const WIDTH = 1000;
const HEIGHT = 100;
/** Hatching over the whole height, at about 45° on a desk's screen. */
const LEAN = 220;
const STROKES = 120;

/** A chart over time. It stretches with the page, so words stand beside the drawing and not in it. */
export function TraceChart(props: TraceChartProps) {
  const { title, unit, times, range, traces, cursor, onCursor, reading } = props;
  const span = timeSpan(times);
  const across = (time: number): number => placeIn(span, time);
  const follow = (event: PointerEvent<SVGSVGElement>): void => {
    const box = event.currentTarget.getBoundingClientRect();
    onCursor(nearest(times, span.low + ((event.clientX - box.left) / box.width) * (span.high - span.low)));
  };
  return (
    <figure className="trace">
      <figcaption>
        {title} <span className="quantity-unit">{unit}</span>
        <span className="trace-key">
          {traces.map(({ name, ink }) => (
            <span key={name} className={`trace-name trace-name-${ink}`}>
              {name}
            </span>
          ))}
        </span>
      </figcaption>
      <div className="trace-field">
        <div className="trace-ticks-up" aria-hidden="true">
          {roundTicks(range, 4).map((tick) => (
            <span key={tick} style={{ bottom: `${placeIn(range, tick) * 100}%` }}>
              {tickText(tick)}
            </span>
          ))}
        </div>
        <svg
          viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
          preserveAspectRatio="none"
          aria-hidden="true"
          onPointerMove={follow}
          onPointerDown={follow}
        >
          <Beyond limit={props.limit} range={range} />
          {roundTicks(range, 4).map((tick) => (
            <path key={tick} className="trace-rule" d={`M0 ${y(range, tick)}H${WIDTH}`} />
          ))}
          {traces.map((trace) => (
            <path
              key={trace.name}
              className={`trace-${trace.ink}${isLine(trace) ? " trace-line" : ""}`}
              d={outline({ trace, times, across, range })}
            />
          ))}
          <path className="trace-cursor" d={`M${across(times[cursor] ?? 0) * WIDTH} 0V${HEIGHT}`} />
        </svg>
        <div className="trace-ticks-along" aria-hidden="true">
          {roundTicks(span, 5).map((tick) => (
            <span key={tick} style={{ left: `${across(tick) * 100}%` }}>
              {tickText(tick)}
            </span>
          ))}
        </div>
      </div>
      <p className="trace-reading">
        <span className="quantity-unit">time in s</span> {reading}
      </p>
    </figure>
  );
}

function isLine({ low, high }: Trace): boolean {
  return low === high;
}

/** From the first time to the last; from 0 where the first is close to it. */
function timeSpan(times: readonly number[]): Range {
  const high = times.at(-1) ?? 0;
  const low = times[0] ?? 0;
  return { low: low < high / 50 ? 0 : low, high };
}

function tickText(tick: number): string {
  return formatNumber(Math.abs(tick) < 1e-12 ? 0 : tick, 3).replace("-", "\u2212");
}

function y(range: Range, value: number): number {
  const share = placeIn(range, value);
  return Math.round((1 - Math.min(1, Math.max(0, share))) * HEIGHT * 100) / 100;
}

/** The region beyond a limit, up and down, hatched. */
function Beyond({ limit, range }: { readonly limit: number | undefined; readonly range: Range }) {
  const clip = useId();
  if (limit === undefined) return null;
  const strokes = Array.from(
    { length: STROKES },
    (_, index) => `M${(index / STROKES) * (WIDTH + LEAN) - LEAN} ${HEIGHT}l${LEAN} -${HEIGHT}`,
  ).join("");
  const above = y(range, limit);
  const below = y(range, -limit);
  return (
    <>
      <clipPath id={clip}>
        <rect width={WIDTH} height={above} />
        <rect y={below} width={WIDTH} height={HEIGHT - below} />
      </clipPath>
      <path className="trace-hatch" clipPath={`url(#${clip})`} d={strokes} />
      <path className="trace-limit" d={`M0 ${above}H${WIDTH}M0 ${below}H${WIDTH}`} />
    </>
  );
}

/** The upper edge from left to right, then the lower one back; a plain line where they are the same. */
function outline(input: {
  readonly trace: Trace;
  readonly times: readonly number[];
  readonly across: (time: number) => number;
  readonly range: Range;
}): string {
  const { trace, times, across, range } = input;
  const points = (values: readonly number[]): string[] =>
    values.map((value, index) => `${(across(times[index] ?? 0) * WIDTH).toFixed(1)} ${y(range, value)}`);
  const upper = points(trace.high);
  if (isLine(trace)) return `M${upper.join("L")}`;
  return `M${upper.join("L")}L${points(trace.low).reverse().join("L")}Z`;
}

function nearest(times: readonly number[], time: number): number {
  const after = times.findIndex((known) => known >= time);
  return after < 0 ? times.length - 1 : after;
}
