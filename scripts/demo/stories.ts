import { commentOnChange } from "../../lib/services/changes/comment";
import { changed } from "./fleet";
import { DEMO_MODELS, storedText, type DemoModel } from "./models";
import { at } from "./people";
import { decide, draft, prove, release, submit, type Walk } from "./walk";

export interface Ids {
  /** By model code. */
  readonly models: Readonly<Record<string, string>>;
  /** By serial number. */
  readonly machines: Readonly<Record<string, string>>;
}

function model(code: string): DemoModel {
  const found = DEMO_MODELS.find((one) => one.code === code);
  if (!found) throw new Error(`There is no demo model ${code}.`);
  return found;
}

function filesOf({ path, text, numbers }: DemoModel, edits: Parameters<typeof changed>[1] = {}) {
  return [{ path, text: text(changed(numbers, edits)) }];
}

function day(now: Date, ahead: number): string {
  return new Date(now.getTime() + ahead * 86_400_000).toISOString().slice(0, 10);
}

interface Permit {
  readonly serial: string;
  readonly code: string;
  readonly title: string;
  readonly reason: string;
  readonly edits: Parameters<typeof changed>[1];
  readonly untilDays: number;
}

/** A permitted deviation of one machine, released and proved. */
async function permit(
  walk: Walk,
  ids: Ids,
  { serial, code, title, reason, edits, untilDays }: Permit,
): Promise<void> {
  const own = model(code);
  const machine = { id: ids.machines[serial] ?? "", serial };
  const change = await draft(walk, 21, {
    machineId: machine.id,
    title,
    reason,
    class: "II",
    deviationUntil: day(walk.now, untilDays),
    files: filesOf(own, edits),
  });
  await submit(walk, 21, change.id);
  await decide(walk, 20, { id: change.id, decision: "approved" });
  await release(walk, 20, change.id);
  await prove(walk, 20, { changeId: change.id, machine, stored: storedText(changed(own.numbers, edits)) });
}

export const DEVIATION_EDITS: Readonly<Record<string, Parameters<typeof changed>[1]>> = {
  "DG-106": { x: { speed: 220 } },
  "LD-105": { x: { run: 0.8 } },
};

export async function permitDeviations(walk: Walk, ids: Ids): Promise<void> {
  await permit(walk, ids, {
    serial: "DG-106",
    code: "dosing-gantry-3",
    title: "Slower X on DG-106 until its belt is changed",
    reason: "The belt shows wear; at full speed it climbs on the pulley.",
    edits: DEVIATION_EDITS["DG-106"],
    untilDays: 90,
  });
  await permit(walk, ids, {
    serial: "LD-105",
    code: "label-drafter-2",
    title: "Less X current on LD-105 while the fan is out",
    reason: "The cabinet fan failed; the new one comes next week.",
    edits: DEVIATION_EDITS["LD-105"],
    untilDays: 9,
  });
}

const SHUTTLE_EDITS = { u: { accel: 2200 } };

/** Changes in every state worth seeing. */
export async function openChanges(walk: Walk, ids: Ids): Promise<void> {
  await overtaken(walk, ids);
  await fasterGantry(walk, ids);
  await others(walk, ids);
}

/** One proposal on a base that a later approval moves, and the change that moves it: in implementation. */
async function overtaken(walk: Walk, ids: Ids): Promise<void> {
  const shuttle = model("tray-shuttle");
  const modelId = ids.models["tray-shuttle"] ?? "";
  const stale = await draft(walk, 9, {
    modelId,
    title: "Gentler sideways lift on the tray shuttle",
    reason: "Glass trays rattle at the start of the lift.",
    class: "II",
    files: filesOf(shuttle, { v: { accel: 300 } }),
  });
  await submit(walk, 9, stale.id);
  const serials = ["TS-101", "TS-102", "TS-103", "TS-104"];
  const change = await draft(walk, 7, {
    modelId,
    title: "Softer ramp for the tray shuttle",
    reason: "Full trays slop over at the start of the run.",
    class: "II",
    effectivity: { kind: "machines", machineIds: serials.map((serial) => ids.machines[serial] ?? "") },
    files: filesOf(shuttle, SHUTTLE_EDITS),
  });
  await submit(walk, 7, change.id);
  await decide(walk, 6, { id: change.id, decision: "approved" });
  await release(walk, 1, change.id);
  const stored = storedText(changed(shuttle.numbers, SHUTTLE_EDITS));
  const machine = (serial: string) => ({ id: ids.machines[serial] ?? "", serial });
  await prove(walk, 1, { changeId: change.id, machine: machine("TS-101"), stored });
  await prove(walk, 1, { changeId: change.id, machine: machine("TS-102"), stored, untested: true });
}

/** The one to decide on: faster X travel, with findings, comments and a deviation that it touches. */
async function fasterGantry(walk: Walk, ids: Ids): Promise<void> {
  const gantry = model("dosing-gantry-3");
  const change = await draft(walk, 3, {
    modelId: ids.models[gantry.code] ?? "",
    title: "Faster X travel on dosing gantry 3",
    reason: "Shorten the plate cycle. Run current raised with the speed to keep torque.",
    class: "I",
    files: filesOf(gantry, { x: { run: 1.05, speed: 500, accel: 8000 } }),
  });
  await submit(walk, 3, change.id);
  const on = { proposalVersion: 1 } as const;
  const comment = (
    minutes: number,
    body: string,
    anchor: Parameters<typeof commentOnChange>[1]["comment"]["anchor"],
  ) =>
    commentOnChange(at(walk.people.technician.actor, walk.now, 2, minutes), {
      id: change.id,
      comment: { ...on, anchor, body },
    });
  await comment(10, "The printed mounts in the annex are already warm to the hand at 0.85 A.", {
    kind: "parameter",
    axis: "x",
    parameter: "run_current",
  });
  const line =
    gantry
      .text(gantry.numbers)
      .split("\n")
      .findIndex((words) => words.startsWith("vmax = 300")) + 1;
  await comment(15, "DG-106 still runs slower because of its belt.", {
    kind: "line",
    path: gantry.path,
    side: "to_be",
    line,
  });
}

/** A draft, a declined and a deferred change. */
async function others(walk: Walk, ids: Ids): Promise<void> {
  const drafter = model("label-drafter-2");
  const gantry = model("dosing-gantry-3");
  const drafterId = ids.models[drafter.code] ?? "";
  await draft(walk, 2, {
    modelId: drafterId,
    title: "Pen lift at half current",
    reason: "The pen motors run warmer than they need to.",
    class: "II",
    files: filesOf(drafter, { z: { run: 0.25 } }),
  });
  const declined = await draft(walk, 12, {
    modelId: drafterId,
    title: "Drafter carriage at 700 mm/s",
    reason: "Sales asks for twice the labels an hour.",
    class: "I",
    files: filesOf(drafter, { x: { speed: 700, accel: 12_000 } }),
  });
  await submit(walk, 12, declined.id);
  await decide(walk, 11, {
    id: declined.id,
    decision: "declined",
    reason: "The controller cannot give the step rate, and the carriage would lose steps.",
  });
  const deferred = await draft(walk, 10, {
    modelId: ids.models[gantry.code] ?? "",
    title: "Quieter valve on dosing gantry 3",
    reason: "The night shift hears the valve through the wall.",
    class: "II",
    files: filesOf(gantry, { a: { accel: 900 } }),
  });
  await submit(walk, 10, deferred.id);
  await decide(walk, 9, {
    id: deferred.id,
    decision: "deferred",
    reason: "Measured first, decided at the next review.",
  });
}
