import type { PlotSpace } from "./plot";

interface Curve {
  readonly space: PlotSpace;
  readonly xs: readonly number[];
  /** Null where there is nothing to draw. */
  readonly ys: readonly (number | null)[];
}

function path({ space, xs, ys }: Curve): string {
  let pen = "M";
  let drawn = "";
  xs.forEach((x, index) => {
    const y = ys[index] ?? null;
    if (y === null) {
      pen = "M";
      return;
    }
    drawn += `${pen}${space.x(x)} ${space.y(y)}`;
    pen = "L";
  });
  return drawn;
}

/** Sides and roles of a line; each has a dash of its own, so that colour never stands alone. */
export type LineKind = "was" | "to-be" | "limit" | "fine" | "load" | "second";

/** A curve through the places of a plot. */
export function PlotLine({ kind, ...curve }: Curve & { readonly kind: LineKind }) {
  return (
    <path className={`plot-line plot-line-${kind}`} d={path(curve)} clipPath={`url(#${curve.space.clip})`} />
  );
}

/** The hatched region above a curve: beyond the limit. */
export function PlotBeyond(curve: Curve) {
  const { space, xs } = curve;
  const [first = 0, last = 0] = [xs[0], xs.at(-1)];
  const region = `${path(curve)}L${space.x(last)} ${space.top}L${space.x(first)} ${space.top}Z`;
  return <path d={region} fill={`url(#${space.hatch})`} clipPath={`url(#${space.clip})`} />;
}

/** A level limit with strokes on its far side, as a wall is drawn; `at` is where its name begins, share of the width. */
export function PlotLimit(mark: {
  readonly space: PlotSpace;
  readonly y: number;
  readonly label: string;
  readonly at: number;
}) {
  const { space, label } = mark;
  const y = space.y(mark.y);
  if (y < space.top - 1 || y > space.bottom + 1) return null;
  const width = space.right - space.left;
  return (
    <g>
      <rect
        x={space.left}
        y={y - 8}
        width={width}
        height={8}
        fill={`url(#${space.hatch})`}
        clipPath={`url(#${space.clip})`}
      />
      <path className="plot-line plot-line-limit" d={`M${space.left} ${y}H${space.right}`} />
      <text className="plot-label" x={space.left + 6 + mark.at * width} y={y + 14}>
        {label}
      </text>
    </g>
  );
}

export interface PlotPointProps {
  readonly space: PlotSpace;
  readonly x: number;
  readonly y: number;
  /** Open before a change, filled after it. */
  readonly kind: "was" | "to-be";
}

/** A working point: open was, filled to be. One beyond the picture stands at its edge. */
export function PlotPoint({ space, x, y, kind }: PlotPointProps) {
  return (
    <circle
      className={`plot-point plot-point-${kind}`}
      cx={Math.min(space.right, Math.max(space.left, space.x(x)))}
      cy={Math.min(space.bottom, Math.max(space.top, space.y(y)))}
      r={kind === "was" ? 5.5 : 5}
    />
  );
}

/** An upright mark with a word at its top: a speed that matters. */
export function PlotUpright({ space, x, label }: { space: PlotSpace; x: number; label: string }) {
  const at = space.x(x);
  if (at < space.left || at > space.right) return null;
  const late = at > (space.left + space.right) / 2;
  return (
    <g>
      <path className="plot-line plot-line-fine" d={`M${at} ${space.top}V${space.bottom}`} />
      <text
        className="plot-label"
        x={late ? at - 4 : at + 4}
        y={space.top + 14}
        textAnchor={late ? "end" : "start"}
      >
        {label}
      </text>
    </g>
  );
}

/** A name at the end of a curve, inside the picture. */
export function PlotName({ space, x, y, name }: { space: PlotSpace; x: number; y: number; name: string }) {
  const at = space.y(y);
  if (at < space.top || at > space.bottom) return null;
  return (
    <text className="plot-label" x={space.x(x) - 4} y={at - 5} textAnchor="end">
      {name}
    </text>
  );
}

export interface KeyItem {
  readonly mark: LineKind | "was-point" | "to-be-point" | "beyond";
  readonly words: string;
}

/** What the marks of a picture mean. */
export function PlotKey({ items }: { readonly items: readonly KeyItem[] }) {
  return (
    <ul className="plot-key">
      {items.map(({ mark, words }) => (
        <li key={words}>
          <svg width="26" height="12" viewBox="0 0 26 12" aria-hidden="true">
            <KeyMark mark={mark} />
          </svg>
          {words}
        </li>
      ))}
    </ul>
  );
}

function KeyMark({ mark }: Pick<KeyItem, "mark">) {
  if (mark === "was-point" || mark === "to-be-point")
    return (
      <circle className={`plot-point plot-point-${mark.replace("-point", "")}`} cx="13" cy="6" r="4.5" />
    );
  if (mark === "beyond") return <path className="plot-hatch" d="M2 11 12 1M9 11 19 1M16 11 24 3" />;
  return <path className={`plot-line plot-line-${mark}`} d="M1 6H25" />;
}
