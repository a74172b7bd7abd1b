import { SYSTEM } from "../../lib/domain/roles";
import { createItem } from "../../lib/services/catalog/create";
import { saveKeyTable } from "../../lib/services/key-tables/save";
import { createMachine } from "../../lib/services/machines/create";
import { recordHardware } from "../../lib/services/machines/record-hardware";
import { refreshMachineStatus } from "../../lib/services/machines/refresh-status";
import { setMachineState } from "../../lib/services/machines/set-state";
import { createModel } from "../../lib/services/models/create";
import { createSite } from "../../lib/services/sites/create";
import { changed, DEMO_MACHINES, type DemoMachine, type DemoSite } from "./fleet";
import { DEMO_ITEMS } from "./hardware";
import { DEMO_MODELS, storedText, type DemoModel } from "./models";
import { at } from "./people";
import { DEVIATION_EDITS, openChanges, permitDeviations, type Ids } from "./stories";
import { decide, draft, prove, read, release, submit, type Walk } from "./walk";

export type Say = (words: string) => void;

const BASELINE_DAYS = 55;

/** The site whose presence says that a loading was begun. */
export const FIRST_SITE = "north-hall";

/** Loads the whole fleet with two months of history behind it. */
export async function loadFleet(walk: Walk, say: Say): Promise<void> {
  say("sites and hardware catalog");
  const sites = await loadSites(walk);
  const items = await loadItems(walk);
  const models = await loadModels(walk, items);
  say("machines, with their first baseline proved on each");
  const early = DEMO_MACHINES.filter(({ story }) => !story.neverRead);
  const machines: Record<string, string> = await loadMachines(walk, early, { sites, models, items });
  for (const model of DEMO_MODELS) await firstBaseline(walk, model, { models, machines });
  const late = DEMO_MACHINES.filter(({ story }) => story.neverRead);
  Object.assign(machines, await loadMachines(walk, late, { sites, models, items }));
  say("permitted deviations");
  const ids: Ids = { models, machines };
  await permitDeviations(walk, ids);
  say("what the machines run today");
  for (const machine of DEMO_MACHINES) await readToday(walk, machine, machines[machine.serial] ?? "");
  say("changes");
  await openChanges(walk, ids);
  for (const id of Object.values(machines)) await refreshMachineStatus({ actor: SYSTEM, now: walk.now }, id);
}

async function loadSites({ people, now }: Walk): Promise<Record<DemoSite, string>> {
  const context = at(people.admin.actor, now, 60);
  const north = await createSite(context, { code: FIRST_SITE, name: "North hall", ambientC: 27 });
  const annex = await createSite(context, { code: "foundry-annex", name: "Foundry annex", ambientC: 36 });
  return { north: north.id, annex: annex.id };
}

async function loadItems({ people, now }: Walk): Promise<Record<string, string>> {
  const ids: Record<string, string> = {};
  for (const item of DEMO_ITEMS)
    ids[item.code] = (
      await createItem(at(people.engineer.actor, now, 60, 10), { ...item, data: { ...item.data } })
    ).id;
  return ids;
}

async function loadModels(
  { people, now }: Walk,
  items: Record<string, string>,
): Promise<Record<string, string>> {
  const ids: Record<string, string> = {};
  const context = at(people.engineer.actor, now, 59);
  for (const { code, name, rules, axes, driver, supply, controller_board, enclosure_rise_k } of DEMO_MODELS) {
    const made = await createModel(context, {
      code,
      name,
      hardware: {
        supply: items[supply] ?? null,
        controller_board: items[controller_board] ?? null,
        enclosure_rise_k,
        has_read_back: true,
        axes: axes.map(({ axis, motor, drive_train, mount, motor_count, load, travel_mm, travel_deg }) => ({
          axis,
          motor_count: motor_count ?? 1,
          motor: items[motor] ?? null,
          driver: items[driver] ?? null,
          drive_train: items[drive_train] ?? null,
          mount: items[mount] ?? null,
          load,
          travel_mm,
          travel_deg,
          coupled_with: [],
        })),
      },
    });
    await saveKeyTable(context, { modelId: made.id, rules: [...rules], note: "First key table", ifMatch: 0 });
    ids[code] = made.id;
  }
  return ids;
}

interface Places {
  readonly sites: Readonly<Record<DemoSite, string>>;
  readonly models: Readonly<Record<string, string>>;
  readonly items: Readonly<Record<string, string>>;
}

async function loadMachines(
  { people, now }: Walk,
  machines: readonly DemoMachine[],
  { sites, models, items }: Places,
): Promise<Record<string, string>> {
  const ids: Record<string, string> = {};
  const days = machines.some(({ story }) => story.neverRead) ? 4 : 58;
  for (const { serial, model, site, story } of machines) {
    const context = at(people.engineer.actor, now, days);
    const { id } = await createMachine(context, {
      serial,
      modelId: models[model] ?? "",
      siteId: sites[site],
      note: "",
    });
    ids[serial] = id;
    if (!story.hardware) continue;
    const { item, ...fact } = story.hardware;
    const technician = at(people.technician.actor, now, days, 30);
    await recordHardware(technician, { ...fact, id, itemId: item ? (items[item] ?? null) : null });
  }
  return ids;
}

/** The first baseline of a model, released to its machines and proved on each. */
async function firstBaseline(walk: Walk, model: DemoModel, { models, machines }: Ids): Promise<void> {
  const change = await draft(walk, BASELINE_DAYS, {
    modelId: models[model.code] ?? "",
    title: `First baseline of ${model.name}`,
    reason: "What the machines were set up with, checked against their hardware and written down.",
    class: "I",
    files: [{ path: model.path, text: model.text(model.numbers) }],
  });
  await submit(walk, BASELINE_DAYS, change.id);
  await decide(walk, BASELINE_DAYS - 1, { id: change.id, decision: "approved" });
  await release(walk, BASELINE_DAYS - 1, change.id);
  const stored = storedText(model.numbers);
  for (const { serial, model: code } of DEMO_MACHINES) {
    const id = machines[serial];
    if (code === model.code && id)
      await prove(walk, BASELINE_DAYS - 1, { changeId: change.id, machine: { id, serial }, stored });
  }
}

/** The routine report of a machine, and what its story adds to it. */
async function readToday(walk: Walk, { serial, model: code, story }: DemoMachine, id: string): Promise<void> {
  const model = DEMO_MODELS.find((one) => one.code === code);
  if (!model || story.neverRead) return;
  const { people, now } = walk;
  const days = story.readDaysAgo ?? 2;
  const machine = { id, serial };
  const numbers = changed(changed(model.numbers, DEVIATION_EDITS[serial]), story.drift);
  const context = (minutes: number) => at(people.technician.actor, now, days, minutes);
  if (story.fileAsRequired)
    await read(context(0), {
      machine,
      layer: "file",
      kind: "in_service",
      path: model.path,
      text: model.text(model.numbers),
    });
  await read(context(5), {
    machine,
    layer: "stored",
    kind: "in_service",
    path: "stored-values.txt",
    text: storedText(numbers),
  });
  if (story.outOfService)
    await setMachineState(at(people.engineer.actor, now, 1), {
      id,
      ifMatch: null,
      state: "out_of_service",
      reason: story.outOfService,
    });
}
