import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { machineRule } from "./check";
import { gather, given, missing } from "./data";
import { readsOf } from "./quantities/table";
import { show, showPercent } from "./show";
import type { RuleContext } from "./types";

const OVER = 0.03;
const NEAR = 0.8;

function assess(context: RuleContext): Assessment {
  if (context.axes.length === 0) return null;
  const stated = context.input.assembly.supply?.voltage_v;
  const drop = context.quantity("cable_drop");
  if (!drop.ok) return drop;
  const parts = gather({
    drop,
    voltage: stated === undefined ? missing("supply.voltage_v") : given(stated),
  });
  if (!parts.ok) return parts;
  const { drop: value, voltage } = parts.values;
  const limit = OVER * voltage;
  const verdict = judgeUpper({ value, limit, near: NEAR * limit, unit: "V" });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      `At full load the cable from the supply loses ${show(value, "V")}, ${showPercent(value / voltage)} of ${show(voltage, "V")}; ${showPercent(OVER)} are allowed.`,
    formula: () =>
      `${parts.formula("drop")} ${upperSign(verdict)} ${OVER} · ${show(voltage, "V")} = ${show(limit, "V")}`,
  });
}

/** The cable is hardware: no parameter of a text clears it. */
export const CABLE_DROP = machineRule({
  id: "cable-drop",
  title: "Voltage lost on the supply cable",
  compares: "The voltage that the cable from the supply loses at full load with 3 % of the supply voltage.",
  formula: "2·l·R'·(P/V)·(234.5 + T)/254.5 ≤ 0.03·V",
  source:
    "Ohm's law with the conductor resistances of IEC 60228, class 5; 3 % is the product's choice. Ampacity and protection are for local codes",
  needs: readsOf("cable_drop"),
  margin: "near above 2.4 % of the supply voltage, over above 3 %",
  caution: null,
  parameters: [],
  candidates: () => [],
  assess,
});
