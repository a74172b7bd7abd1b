import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { axisRule } from "./check";
import { readsOf } from "./quantities/table";
import { plain } from "./show";
import type { AxisView } from "./types";

const USUAL = 10;

function assess(axis: AxisView): Assessment {
  const ratio = axis.quantity("inertia_ratio");
  if (!ratio.ok) return ratio;
  const { value, assumed } = ratio;
  const high = exceeds(value, USUAL);
  return judged(hint({ value, applies: high, nearLimit: USUAL, unit: "" }), {
    assumed,
    sentence: () =>
      `The load's inertia at the shaft is ${plain(value)} times the rotor's${high ? `, more than the ${USUAL} that is usual: expect slow starts and long ringing` : ""}.`,
    formula: () => `${ratio.formula()} ${high ? ">" : "≤"} ${USUAL}`,
  });
}

/** The hardware decides; a text cannot clear it. */
export const INERTIA_RATIO = axisRule({
  id: "inertia-ratio",
  title: "Inertia of the load against the rotor",
  compares: "The load's inertia at the motor shaft with ten times the rotor's.",
  formula: "(J_drive + m·r²/n)/J_rotor ≤ 10",
  source: "Reflected inertia from equal kinetic energy; 10 is common practice, no source",
  needs: readsOf("inertia_ratio"),
  margin: "near above 10, never over",
  caution: null,
  parameters: () => [],
  assess,
});
