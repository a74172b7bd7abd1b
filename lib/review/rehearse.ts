import type { Assembly } from "@/lib/domain/assembly";
import type { Finding } from "@/lib/domain/findings";
import { gravest, levelRank } from "@/lib/domain/levels";
import type { RehearsedFinding, RehearsedMachine } from "@/lib/domain/rehearsals";
import { checkConfiguration } from "./check";
import { isGraver, pairFindings } from "./compare-findings";
import { hottestRoom, inRoom } from "./hottest-room";
import type { CheckInput } from "./types";

/** The same machine in a room that is warmer by `riseK`; a room whose temperature nobody has stated stays unknown. */
export function warmer(assembly: Assembly, riseK: number): Assembly {
  const { ambient_c: ambient } = assembly;
  return ambient === undefined ? assembly : inRoom(assembly, ambient + riseK);
}

export interface RehearsalInput {
  /** What the machine is required to run, on its own hardware of today. */
  readonly today: CheckInput;
  /** The hardware or the room that is rehearsed. */
  readonly toBe: Assembly;
  /** Where another part would be fitted; empty where only the room is another. */
  readonly axes: readonly string[];
  /** Hardware whose hottest room is asked for. */
  readonly room: "today" | "to_be";
}

/** What the required configuration of one machine comes to on other hardware or in another room; nothing is changed. */
export function rehearse({ today, toBe, axes, room }: RehearsalInput): RehearsedMachine {
  const was = checkConfiguration(today);
  const after = checkConfiguration({ ...today, assembly: toBe });
  const { parameters } = room === "today" ? was : after;
  const assembly = room === "today" ? today.assembly : toBe;
  return {
    concerned: true,
    was: gravest(was.findings.map(({ level }) => level)),
    toBe: gravest(after.findings.map(({ level }) => level)),
    axes: [...axes],
    graver: graverFindings(was.findings, after.findings),
    hottestRoom: hottestRoom({ parameters, assembly, policy: today.policy }),
    trouble: null,
  };
}

/** A machine on which there is nothing to rehearse, and why. */
export function notRehearsed(trouble: string, concerned: boolean): RehearsedMachine {
  return {
    concerned,
    was: "cannot",
    toBe: "cannot",
    axes: [],
    graver: [],
    hottestRoom: null,
    trouble,
  };
}

function graverFindings(before: readonly Finding[], after: readonly Finding[]): RehearsedFinding[] {
  return pairFindings(before, after)
    .flatMap(({ was, toBe }) =>
      toBe && isGraver(was?.level ?? "within", toBe.level) ? [rehearsed(toBe, was)] : [],
    )
    .sort((one, other) => levelRank(one.toBe) - levelRank(other.toBe));
}

function rehearsed(finding: Finding, was: Finding | null): RehearsedFinding {
  const { ruleId, axis, level, sentence, unit, value, limit, nearLimit, limitSense } = finding;
  return {
    ruleId,
    axis,
    was: was?.level ?? null,
    toBe: level,
    sentence,
    unit,
    valueWas: was?.value ?? null,
    value,
    limit,
    nearLimit,
    limitSense,
  };
}
