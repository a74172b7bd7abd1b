import type { TestPlan } from "@/lib/domain/test-sheets";
import { LEAST_TRIALS } from "@/lib/physics/evidence/ladder";

/** Rows that fit on one sheet of paper beside the rest. */
const MOST_ROWS = 30;
const HEAT_ROWS = 8;
const APPROACH_ROWS = 5;

/** Empty rows, on paper alone, for a floor where no device is allowed. */
export function PaperRows({ plan: { ladder, run } }: { readonly plan: TestPlan }) {
  const wanted = ladder ? LEAST_TRIALS + APPROACH_ROWS : (run?.trials ?? HEAT_ROWS);
  const heads = ladder
    ? ["Level", "Passed or failed", "Off by", "Temperatures", "Time"]
    : run
      ? ["Passed or failed", "Off by", "Temperatures", "Time"]
      : ["Minutes", "Case, °C", "Winding, °C or Ω", "Ambient, °C", "Time"];
  return (
    <table className="ruled paper-rows" aria-hidden="true">
      <thead>
        <tr>
          {["No.", ...heads].map((head) => (
            <th key={head}>{head}</th>
          ))}
        </tr>
      </thead>
      <tbody>
        {Array.from({ length: Math.min(wanted, MOST_ROWS) }, (_, row) => (
          <tr key={row}>
            <td>{row + 1}</td>
            {heads.map((head) => (
              <td key={head} />
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
