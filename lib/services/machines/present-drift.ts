import "server-only";
import type { ParameterValue } from "@/lib/domain/values";
import type { DriftItem } from "@/lib/review/drift-types";
import type { DeviationView, DriftItemView, DriftView, ValueView } from "@/lib/schemas/machines-read";
import type { Deviation } from "@/models/implementation";
import type { Finding } from "@/lib/domain/findings";
import type { MachineCondition } from "./condition";
import { NO_BASELINE } from "./refresh-status";
import type { RequiredConfiguration } from "./required";

/** A finding as answers carry it; its lists are copies, so that what is answered can be added to. */
function presentFinding(finding: Finding): DriftItemView["consequences"][number]["toBe"] {
  return {
    ...finding,
    parameters: [...finding.parameters],
    spans: [...finding.spans],
    needs: [...finding.needs],
    assumed: [...finding.assumed],
  };
}

export function presentValue({ value, unit, basis }: ParameterValue): ValueView {
  return { value, unit, basis };
}

export function presentDeviation(deviation: Deviation): DeviationView {
  const { id, reason, approvedByName, fromAt, untilOn, changeId, edits } = deviation;
  const parameters = edits.map(({ axis, parameter }) => ({ axis, parameter }));
  return { id, reason, approvedByName, fromAt: fromAt.toISOString(), untilOn, changeId, parameters };
}

export function presentBaseline({ id, number, since }: RequiredConfiguration["baseline"]) {
  return { id, number, since: since.toISOString() };
}

function presentItem({ required, actual, readAt, consequences, ...item }: DriftItem): DriftItemView {
  return {
    ...item,
    required: required && presentValue(required),
    actual: actual && presentValue(actual),
    readAt: readAt?.toISOString() ?? null,
    consequences: consequences.map(({ was, toBe }) => ({
      was: was && presentFinding(was),
      toBe: presentFinding(toBe),
    })),
  };
}

/** Where a machine stands against what it requires. */
export function presentDrift(condition: MachineCondition, asOf: Date): DriftView {
  const { machine, required, drift } = condition;
  return {
    machineId: machine.id,
    serial: machine.serial,
    asOf: asOf.toISOString(),
    level: drift ? drift.level : "cannot",
    sentence: drift?.sentence ?? NO_BASELINE,
    baseline: required && presentBaseline(required.baseline),
    deviations: (required?.deviations ?? []).map(presentDeviation),
    items: (drift?.items ?? []).map(presentItem),
  };
}
