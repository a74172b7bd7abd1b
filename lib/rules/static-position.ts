import { SUDDEN_LOAD_SHARE } from "@/lib/physics/static-torque";
import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters, raiseCurrent } from "./candidates";
import { axisRule } from "./check";
import { lengthUnit } from "./quantities/geometry";
import { standstillCurrent, standstillLoad } from "./quantities/static-position";
import { readsOf } from "./quantities/table";
import { plain, show, showPercent } from "./show";
import type { AxisView } from "./types";

const NEAR = 0.5;

function assess(axis: AxisView): Assessment {
  const load = standstillLoad(axis);
  const error = axis.quantity("static_position_error");
  if (!load.ok) return load;
  if (!error.ok && error.needs.length > 0) return error;
  const { steady, friction, holding } = load;
  // Without torque the question is hold-torque's, or there is no load at all.
  if (holding === 0) return null;
  const share = (steady + friction) / holding;
  const verdict = judgeUpper({ value: share, limit: SUDDEN_LOAD_SHARE, near: NEAR, unit: "" });
  const sparing = verdict.level === "over" ? sparedBy(axis, steady <= SUDDEN_LOAD_SHARE * holding) : "";
  const current = standstillCurrent(axis) === "hold_current" ? "hold current" : "run current";
  return judged(
    { ...verdict, level: sparing === "" ? verdict.level : "near" },
    {
      assumed: load.assumed,
      sentence: () =>
        error.ok
          ? `On ${current} the load takes ${showPercent(share)} of the torque at standstill: the axis may rest up to ${show(error.value, lengthUnit(axis))} beside its position, whatever the microsteps are.${sparing}`
          : `On ${current} load and friction ask ${showPercent(share)} of the torque at standstill: there is no position of rest that the motor decides.${sparing}`,
      formula: () =>
        `(${show(steady, "N·m")} + ${show(friction, "N·m")} friction) / ${show(holding, "N·m")} = ${plain(share)} ${upperSign(verdict)} ${plain(SUDDEN_LOAD_SHARE)}${error.ok ? `; ${error.formula()}` : ""}`,
    },
  );
}

/** Why a load beyond the limit is a caution only; empty where nothing spares it. */
function sparedBy(axis: AxisView, isFriction: boolean): string {
  if (isFriction)
    return " It is a caution and no more because friction makes up the rest: it throws no rotor over.";
  return axis.hardware.load?.holding_brake === true
    ? " It is a caution and no more because a holding brake carries it: only while the brake is on."
    : "";
}

function standstillParameters(axis: AxisView) {
  const own = currentParameters(axis, standstillCurrent(axis));
  return axis.parameter("hold_current")?.unit === "%"
    ? [...own, ...currentParameters(axis, "run_current")]
    : own;
}

export const STATIC_POSITION = axisRule({
  id: "static-position",
  title: "Position error under load",
  compares:
    "The load at standstill with the torque at standstill, and how far it pulls the axis from its position.",
  formula: "(|F_ext + W| + F_f)/n·r/Th(I) ≤ 0.7246; error = asin(T_L/Th)/Nr·r",
  source:
    "T·sin(Nr·θ) about a step (Acarnley, Stepping Motors); 0.7246 is the greatest load that may come suddenly, from the equal-area criterion; 0.5 is the product's choice",
  needs: [...readsOf("static_position_error"), "load.holding_brake"],
  margin:
    "near above 50 % of the torque at standstill (a third of a full step of error), over above 72.5 % (near where friction alone or a holding brake accounts for it); no verdict where weight or an external force pulls and the text has no hold current",
  caution: null,
  parameters: standstillParameters,
  candidates: (axis) => raiseCurrent(axis, standstillCurrent(axis)),
  assess,
});
