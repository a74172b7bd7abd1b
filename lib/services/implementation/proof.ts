import "server-only";
import type { Transaction } from "sequelize";
import { diffParameters } from "@/lib/diff/parameters";
import { parameterLabel } from "@/lib/domain/parameters";
import { joinWords } from "@/lib/domain/sentences";
import type { CheckReport } from "@/lib/review/types";
import type { LotMachine } from "@/models/implementation";
import { Verification } from "@/models/implementation";
import type { MachineCondition, StandingLayer } from "@/lib/services/machines/condition";
import { machineCondition } from "@/lib/services/machines/condition";

/** How far a machine's implementation step has come, and the sentence that says what is still missing. */
export interface Proof {
  readonly applied: boolean;
  readonly missing: string | null;
}

/**
 * What proves a change on one machine: its text was downloaded; a stored or running reading taken after that, from the
 * right serial number, reads back the required configuration (a model without read-back: the as-left file and the
 * technician's statement); and a passed test is recorded.
 */
export async function proofOf(place: LotMachine, asOf: Date, transaction?: Transaction): Promise<Proof> {
  const condition = await machineCondition(place.machineId, asOf, transaction);
  const tests = await Verification.findAll({
    where: { lotMachineId: place.id },
    order: [["at", "DESC"]],
    transaction: transaction ?? null,
  });
  const applied = asLeftMatches(condition, place);
  return { applied, missing: firstMissing({ place, condition, applied, tests }) };
}

interface Facts {
  readonly place: LotMachine;
  readonly condition: MachineCondition;
  readonly applied: boolean;
  /** Newest first. */
  readonly tests: readonly Verification[];
}

function firstMissing({ place, condition, applied, tests }: Facts): string | null {
  if (!place.downloadedAt) return "The text for this machine has not been downloaded yet.";
  const readBack = condition.hardware.hasReadBack
    ? missingReadBack(condition, place.downloadedAt)
    : missingStatement({ condition, applied, tests });
  if (readBack) return readBack;
  const [newest] = tests;
  if (!newest) return "The test on the machine is not recorded yet.";
  return newest.result === "pass" ? null : "The last test on the machine failed.";
}

function missingReadBack(
  { machine, layers, requiredReport }: MachineCondition,
  downloadedAt: Date,
): string | null {
  const readBacks = [layers.running, layers.stored].filter((layer) => layer !== undefined);
  const after = readBacks.filter(({ reading }) => reading.readAt >= downloadedAt);
  const [newest] = after;
  if (!newest) return "No stored or running values have been read back since the download.";
  const right = after.filter(
    ({ reading }) => reading.serial?.trim().toLowerCase() === machine.serial.toLowerCase(),
  );
  if (right.length === 0) return `The read-back does not name the serial number ${machine.serial}.`;
  const wrong = right
    .map(({ report }) => differences(report, requiredReport))
    .find((words) => words !== null);
  return wrong ?? null;
}

function missingStatement({
  condition,
  applied,
  tests,
}: Pick<Facts, "condition" | "applied" | "tests">): string | null {
  if (!applied) {
    const found =
      condition.layers.file && differences(condition.layers.file.report, condition.requiredReport);
    return found ?? "The as-left text has not been uploaded yet.";
  }
  if (tests.some(({ statement }) => statement)) return null;
  return "This model has no read-back: the technician's statement that the text was applied is missing.";
}

/** In words, what a reading has otherwise than required, or does not state; null where it states all as required. */
function differences(report: CheckReport, required: CheckReport | null): string | null {
  const changed = diffParameters(required?.parameters ?? [], report.parameters).filter(
    ({ was }) => was !== null,
  );
  if (changed.length === 0) return null;
  const names = changed.slice(0, 4).map(({ axis, parameter }) => {
    const label = parameterLabel(parameter).toLowerCase();
    return axis === null ? label : `${axis.toUpperCase()} ${label}`;
  });
  const more = changed.length > 4 ? [`${changed.length - 4} more`] : [];
  return `What was read back is not as required: ${joinWords([...names, ...more])}.`;
}

function asLeftMatches({ layers, requiredReport }: MachineCondition, place: LotMachine): boolean {
  const asLeft = (layer: StandingLayer) =>
    layer.reading.kind === "as_left" && layer.reading.readAt >= place.releasedAt;
  return Object.values(layers).some(
    (layer) => asLeft(layer) && differences(layer.report, requiredReport) === null,
  );
}
