"use client";

import {
  useEffect,
  useId,
  useRef,
  useState,
  type KeyboardEvent,
  type PointerEvent,
  type ReactNode,
} from "react";
import { formatNumber } from "@/lib/domain/units";
import { roundTicks } from "@/lib/review/plot-range";

/** One scale of a picture; `start` and `end` in inside units, `factor` leads to the unit shown. */
export interface PlotAxis {
  readonly title: string;
  readonly unit: string;
  readonly factor: number;
  readonly start: number;
  readonly end: number;
}

/** Where things lie in the drawing, CSS pixels. */
export interface PlotSpace {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  /** Value in inside units to pixels. */
  readonly x: (value: number) => number;
  readonly y: (value: number) => number;
  /** Names that belong to this picture alone. */
  readonly clip: string;
  readonly hatch: string;
}

export interface PlotReading {
  readonly label: string;
  readonly value: string;
}

export interface PlotProps {
  /** Names the picture. */
  readonly label: string;
  readonly x: PlotAxis;
  readonly y: PlotAxis;
  /** Places on the x scale that can be read, rising. */
  readonly places: readonly number[];
  /** What stands there, as a person reads it. */
  readonly read: (index: number) => readonly PlotReading[];
  /** The marks, in the plot's space. */
  readonly children: (space: PlotSpace) => ReactNode;
  readonly legend: ReactNode;
}

const HEIGHT = 330;
const EDGE = { left: 58, right: 22, top: 28, bottom: 46 } as const;
/** Drawn before the page knows how much room there is. */
const FIRST_WIDTH = 640;

function useWidth() {
  const frame = useRef<HTMLDivElement>(null);
  const [width, setWidth] = useState(FIRST_WIDTH);
  useEffect(() => {
    const element = frame.current;
    if (!element) return;
    const observer = new ResizeObserver(() => setWidth(Math.max(240, Math.floor(element.clientWidth))));
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return { frame, width };
}

interface Room {
  readonly width: number;
  readonly x: PlotAxis;
  readonly y: PlotAxis;
  readonly id: string;
}

function spaceOf({ width, x, y, id }: Room): PlotSpace {
  const right = width - EDGE.right;
  const bottom = HEIGHT - EDGE.bottom;
  const round = (pixels: number) => Math.round(pixels * 10) / 10;
  return {
    left: EDGE.left,
    right,
    top: EDGE.top,
    bottom,
    x: (value) => round(EDGE.left + ((value - x.start) / (x.end - x.start)) * (right - EDGE.left)),
    // Far beyond the picture all the same: drawings take no numbers of any size.
    y: (value) =>
      round(
        bottom - Math.min(20, Math.max(-20, (value - y.start) / (y.end - y.start))) * (bottom - EDGE.top),
      ),
    clip: `${id}-clip`,
    hatch: `${id}-hatch`,
  };
}

function Scales({ space, x, y }: { space: PlotSpace; x: PlotAxis; y: PlotAxis }) {
  const { left, right, top, bottom } = space;
  const ticks = (axis: PlotAxis, count: number) =>
    roundTicks(axis.start * axis.factor, axis.end * axis.factor, count);
  return (
    <g className="plot-scales">
      {ticks(y, 5).map((shown) => (
        <g key={shown}>
          <path className="plot-grid" d={`M${left} ${space.y(shown / y.factor)}H${right}`} />
          <text x={left - 7} y={space.y(shown / y.factor) + 4} textAnchor="end">
            {formatNumber(shown, 4)}
          </text>
        </g>
      ))}
      {ticks(x, right - left < 420 ? 4 : 7).map((shown) => (
        <g key={shown}>
          <path className="plot-tick" d={`M${space.x(shown / x.factor)} ${bottom}v5`} />
          <text x={space.x(shown / x.factor)} y={bottom + 18} textAnchor="middle">
            {formatNumber(shown, 4)}
          </text>
        </g>
      ))}
      <path className="plot-frame" d={`M${left} ${top}V${bottom}H${right}`} />
      <text className="plot-title" x={left} y={14}>
        {`${y.title}, ${y.unit}`}
      </text>
      <text className="plot-title" x={right} y={HEIGHT - 7} textAnchor="end">
        {`${x.title}, ${x.unit}`}
      </text>
    </g>
  );
}

/** Keys that move the reading place, as on a slider. */
function placeAfter(key: string, at: number, last: number): number | null {
  const steps: Readonly<Record<string, number>> = {
    ArrowRight: at + 1,
    ArrowUp: at + 1,
    ArrowLeft: at - 1,
    ArrowDown: at - 1,
    PageUp: at + Math.max(1, Math.round(last / 10)),
    PageDown: at - Math.max(1, Math.round(last / 10)),
    Home: 0,
    End: last,
  };
  const next = steps[key];
  return next === undefined ? null : Math.min(last, Math.max(0, next));
}

function nearest(places: readonly number[], value: number): number {
  let best = 0;
  places.forEach((place, index) => {
    if (Math.abs(place - value) < Math.abs((places[best] ?? 0) - value)) best = index;
  });
  return best;
}

const HINT = "Point at the picture, or focus it and use the arrow keys, to read the values at one place.";

/** A drawn scale with marks in it; the values at one place are read by pointer and by keyboard. */
export function Plot({ label, x, y, places, read, children, legend }: PlotProps) {
  const id = useId();
  const { frame, width } = useWidth();
  const [cursor, setCursor] = useState<number | null>(null);
  const space = spaceOf({ width, x, y, id });
  const last = places.length - 1;
  const at = cursor === null ? null : Math.min(cursor, last);
  const readings = at === null ? [] : read(at);
  const words = readings.map(({ label: name, value }) => `${name} ${value}`).join(", ");
  const onKeyDown = (event: KeyboardEvent): void => {
    const next = placeAfter(event.key, at ?? 0, last);
    if (next === null) return;
    event.preventDefault();
    setCursor(next);
  };
  const onPointer = ({ clientX, currentTarget }: PointerEvent<HTMLDivElement>): void => {
    const pixels = clientX - currentTarget.getBoundingClientRect().left;
    const share = (pixels - space.left) / (space.right - space.left);
    setCursor(nearest(places, x.start + share * (x.end - x.start)));
  };
  return (
    <figure className="plot">
      <div
        ref={frame}
        className="plot-picture"
        role="slider"
        tabIndex={0}
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={last}
        aria-valuenow={at ?? 0}
        aria-valuetext={words === "" ? HINT : words}
        onKeyDown={onKeyDown}
        onPointerMove={onPointer}
        onPointerDown={onPointer}
      >
        <svg width={width} height={HEIGHT} viewBox={`0 0 ${width} ${HEIGHT}`} aria-hidden="true">
          <defs>
            <clipPath id={space.clip}>
              <rect
                x={space.left}
                y={space.top}
                width={space.right - space.left}
                height={space.bottom - space.top}
              />
            </clipPath>
            <pattern id={space.hatch} width="7" height="7" patternUnits="userSpaceOnUse">
              <path className="plot-hatch" d="M-1 8 8-1M-1 1 1-1M6 8 8 6" />
            </pattern>
          </defs>
          <Scales space={space} x={x} y={y} />
          {children(space)}
          {at !== null && (
            <path className="plot-cursor" d={`M${space.x(places[at] ?? 0)} ${space.top}V${space.bottom}`} />
          )}
        </svg>
      </div>
      <figcaption>
        <p className="plot-reading">
          {readings.length === 0
            ? HINT
            : readings.map(({ label: name, value }) => (
                <span key={name}>
                  {name} <strong>{value}</strong>
                </span>
              ))}
        </p>
        {legend}
      </figcaption>
    </figure>
  );
}
