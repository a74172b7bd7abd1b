import type { FloorCell } from "@/lib/domain/floor";
import type { Level } from "@/lib/domain/levels";

/** Pixels. The bar stands on the middle line, up for more than required, down for less. */
const WIDTH = 28;
const HEIGHT = 24;
const MIDDLE = 12;
const BAR = 11;
const LONGEST = 11;
const SHORTEST = 3.5;

function Bar({ share, level }: { share: number; level: Level }) {
  const length = Math.max(SHORTEST, Math.min(1, Math.abs(share)) * LONGEST);
  const left = (WIDTH - BAR) / 2;
  const top = share < 0 ? MIDDLE : MIDDLE - length;
  return (
    <g className={`level-${level}`}>
      <path className="cell-middle" d={`M${left - 3} ${MIDDLE}h${BAR + 6}`} />
      <rect className={`cell-bar cell-bar-${level}`} x={left} y={top} width={BAR} height={length} />
      {level === "near" && <rect className="cell-half" x={left} y={top} width={BAR / 2} height={length} />}
      {level === "cannot" && (
        <path
          className="cell-hatch"
          d={`M${left} ${top + length}l${BAR} ${-length}M${left} ${top + length / 2}l${BAR / 2} ${-length / 2}`}
        />
      )}
    </g>
  );
}

/** A floor cell that is not as required: a bar for drift, a ring for a permitted deviation, a dash for not read. */
export function CellMark({ cell }: { readonly cell: FloorCell }) {
  return (
    <svg width={WIDTH} height={HEIGHT} viewBox={`0 0 ${WIDTH} ${HEIGHT}`} aria-hidden="true">
      {cell.kind === "drift" && <Bar share={cell.share ?? 0} level={cell.level ?? "within"} />}
      {cell.kind === "deviation" && <circle className="cell-ring" cx={WIDTH / 2} cy={MIDDLE} r="5" />}
      {cell.kind === "not_read" && <path className="cell-dash" d={`M${WIDTH / 2 - 4} ${MIDDLE}h8`} />}
    </svg>
  );
}
