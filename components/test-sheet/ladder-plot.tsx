import { parameterLabel } from "@/lib/domain/parameters";
import type { LadderPlan } from "@/lib/domain/test-sheets";
import { showQuantity } from "@/lib/domain/units";
import { levelOf } from "@/lib/physics/evidence/ladder";
import { ScrollRegion } from "@/components/ui/scroll-region";
import type { LadderEstimate } from "@/lib/physics/evidence/ladder-estimate";

const WIDTH = 640;
const HEIGHT = 220;
const LEFT = 64;
const BOTTOM = 34;
const TOP = 10;

export interface LadderPlotProps {
  readonly plan: LadderPlan;
  readonly trials: readonly { readonly rung: number; readonly failed: boolean }[];
  readonly estimate: LadderEstimate | null;
}

/** Levels over trials: open dots passed, filled squares failed, a line at the estimate. The table beside says the same. */
export function LadderPlot({ plan, trials, estimate }: LadderPlotProps) {
  if (trials.length === 0) return null;
  const rungs = trials.map(({ rung }) => rung);
  const [low, high] = [Math.min(...rungs) - 1, Math.max(...rungs) + 1];
  const x = (index: number) => LEFT + ((index + 0.5) * (WIDTH - LEFT - 10)) / Math.max(trials.length, 12);
  const y = (rung: number) => HEIGHT - BOTTOM - ((rung - low) * (HEIGHT - BOTTOM - TOP)) / (high - low);
  const every = Math.max(1, Math.ceil((high - low) / 6));
  const marked = Array.from({ length: high - low + 1 }, (_, index) => low + index).filter(
    (rung) => rung % every === 0 && levelOf(plan, rung) >= 0,
  );
  const { unit } = showQuantity(levelOf(plan, 0), plan.unit, 4);
  const label = `${parameterLabel(plan.parameter)}, ${unit}`;
  return (
    <ScrollRegion label="Levels by trial">
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        className="ladder-plot"
        role="img"
        aria-label={`${label} of each trial; the table of entries gives the numbers.`}
      >
        {marked.map((rung) => (
          <g key={rung}>
            <line x1={LEFT} x2={WIDTH} y1={y(rung)} y2={y(rung)} className="ladder-line" />
            <text x={LEFT - 6} y={y(rung) + 4} textAnchor="end">
              {showQuantity(levelOf(plan, rung), plan.unit, 4).number}
            </text>
          </g>
        ))}
        <polyline
          className="ladder-way"
          points={trials.map(({ rung }, index) => `${x(index)},${y(rung)}`).join(" ")}
        />
        {estimate && (
          <line
            x1={LEFT}
            x2={WIDTH}
            y1={y((estimate.mean - plan.start) / plan.step)}
            y2={y((estimate.mean - plan.start) / plan.step)}
            className="ladder-estimate"
          />
        )}
        {trials.map(({ rung, failed }, index) =>
          failed ? (
            <rect
              key={index}
              x={x(index) - 5}
              y={y(rung) - 5}
              width={10}
              height={10}
              className="ladder-failed"
            />
          ) : (
            <circle key={index} cx={x(index)} cy={y(rung)} r={5} className="ladder-passed" />
          ),
        )}
        <text x={LEFT} y={HEIGHT - 8}>
          {`${label}, by trial; open dot passed, filled square failed${estimate ? ", line at the estimate" : ""}`}
        </text>
      </svg>
    </ScrollRegion>
  );
}
