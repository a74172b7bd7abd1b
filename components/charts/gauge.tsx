import { type Level } from "@/lib/domain/levels";
import {
  gaugeMark,
  gaugePlace,
  gaugeScale,
  gaugeUse,
  type GaugeReading,
  type GaugeScale,
} from "@/lib/review/gauge-scale";
import { gaugeWords } from "@/lib/review/gauge-text";

export interface GaugeProps {
  readonly reading: GaugeReading;
  /** Unit of the reading, for the text alternative. */
  readonly unit: string;
  readonly level: Level;
  /** One for all gauges of a table (`gaugeScale` of all its readings); left out: a scale of its own. */
  readonly scale?: GaugeScale | undefined;
}

/** Drawing units are CSS pixels at the gauge's natural size. */
const WIDTH = 128;
const HEIGHT = 18;
const PAD = 7;
const MIDDLE = 9;
const HATCH_STEP = 4;

function x(at: number): number {
  return Math.round((PAD + at * (WIDTH - 2 * PAD)) * 10) / 10;
}

/** Short strokes rising to the right from `from` to the right end. */
function hatchPath(from: number): string {
  const strokes: string[] = [];
  for (let left = from; left < WIDTH - PAD; left += HATCH_STEP) {
    const run = Math.min(6, WIDTH - PAD - left);
    strokes.push(`M${left.toFixed(1)} ${MIDDLE + 3}l${run.toFixed(1)} ${-run}`);
  }
  return strokes.join("");
}

function chevron(beyond: "low" | "high"): string {
  return beyond === "high" ? `M${WIDTH - 4} ${MIDDLE - 4}l3.5 4l-3.5 4` : `M4 ${MIDDLE - 4}l-3.5 4l3.5 4`;
}

function Dot({
  value,
  reading,
  scale,
  kind,
}: {
  value: number;
  reading: GaugeReading;
  scale: GaugeScale;
  kind: "now" | "before";
}) {
  const use = gaugeUse(value, reading);
  if (use === null) return null;
  const place = gaugePlace(use, scale);
  return (
    <g className={`gauge-${kind}`}>
      <circle cx={x(place.at)} cy={MIDDLE} r={kind === "now" ? 4 : 4.2} />
      {place.beyond && <path d={chevron(place.beyond)} />}
    </g>
  );
}

/**
 * A value against its limit: a line, a tick at the limit, hatching beyond it, a filled dot for the value, an open dot
 * for the value before. The limit of every gauge of one scale stands at the same place; the right is the bad side.
 */
export function Gauge({ reading, unit, level, scale }: GaugeProps) {
  const mark = gaugeMark(reading);
  if (mark === null || mark === 0 || reading.value === null) return null;
  const used = scale ?? gaugeScale([reading]);
  const limitX = x(gaugePlace(1, used).at);
  const nearUse = typeof reading.nearLimit === "number" ? gaugeUse(reading.nearLimit, reading) : null;
  const nearX = nearUse === null ? limitX : x(gaugePlace(nearUse, used).at);
  return (
    <svg
      className={`gauge gauge-of-${level}`}
      width={WIDTH}
      height={HEIGHT}
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      role="img"
      aria-label={gaugeWords({ reading, unit, level })}
    >
      {reading.limit !== null && <path className="gauge-hatch" d={hatchPath(limitX)} />}
      {nearX < limitX && <path className="gauge-near-zone" d={`M${nearX} ${MIDDLE}H${limitX}`} />}
      <path className="gauge-line" d={`M${PAD} ${MIDDLE}H${WIDTH - PAD}`} />
      <path
        className={reading.limit === null ? "gauge-tick gauge-tick-near" : "gauge-tick"}
        d={`M${limitX} ${MIDDLE - 7}V${MIDDLE + 7}`}
      />
      {typeof reading.before === "number" && (
        <Dot value={reading.before} reading={reading} scale={used} kind="before" />
      )}
      <Dot value={reading.value} reading={reading} scale={used} kind="now" />
    </svg>
  );
}
