import type { HardwareFact } from "../../lib/domain/catalog";
import type { AxisNumbers, ModelNumbers } from "./models";

export type DemoSite = "north" | "annex";

/** What one machine has otherwise than it should. */
export interface DemoStory {
  /** Values that differ in the newest stored reading. */
  readonly drift?: Readonly<Record<string, Partial<AxisNumbers>>>;
  /** The file was read as well, and is as required. */
  readonly fileAsRequired?: boolean;
  /** Days since it was last read; 2 where not said. */
  readonly readDaysAgo?: number;
  readonly neverRead?: boolean;
  readonly outOfService?: string;
  readonly hardware?: Omit<HardwareFact, "itemId"> & { readonly item?: string };
}

export interface DemoMachine {
  readonly serial: string;
  readonly model: string;
  readonly site: DemoSite;
  readonly story: DemoStory;
}

const STORIES: Readonly<Record<string, DemoStory>> = {
  "LD-107": { drift: { x: { run: 0.35 } }, fileAsRequired: true },
  "DG-104": { drift: { z: { hold: 0.15 } } },
  "DG-111": { drift: { y: { run: 0.95 } } },
  "DG-112": { drift: { x: { scale: 79.76 } } },
  "DG-103": { drift: { x: { speed: 480, accel: 5000 } } },
  "DG-109": { drift: { y: { speed: 200 } } },
  "LD-103": { drift: { x: { corner: 8 } } },
  "LD-110": { drift: { x: { accel: 4000 }, y: { accel: 3200 } }, fileAsRequired: true },
  "TS-108": { readDaysAgo: 40 },
  "TS-114": { neverRead: true },
  "LD-116": { outOfService: "Bridge bearing worn; waits for the spare part." },
  "DG-115": {
    hardware: {
      axis: "x",
      part: "motor",
      item: "carriage-motor-b",
      data: {},
      evidence: "Label of the motor read at the machine after the swap; photo in the service log",
    },
  },
  "LD-108": {
    hardware: {
      axis: "x",
      part: "sense_resistor",
      data: { sense_resistance_ohm: 0.05 },
      evidence: "Marking R050 read on the board with a glass; boards of this name otherwise carry R100",
    },
  },
};

function row(
  prefix: string,
  model: string,
  { north, annex }: Readonly<Record<DemoSite, number>>,
): DemoMachine[] {
  return Array.from({ length: north + annex }, (_, index) => {
    const serial = `${prefix}-${101 + index}`;
    return { serial, model, site: index < north ? "north" : "annex", story: STORIES[serial] ?? {} };
  });
}

/** Fifty machines on two sites. */
export const DEMO_MACHINES: readonly DemoMachine[] = [
  ...row("DG", "dosing-gantry-3", { north: 12, annex: 8 }),
  ...row("LD", "label-drafter-2", { north: 10, annex: 6 }),
  ...row("TS", "tray-shuttle", { north: 8, annex: 6 }),
];

/** Numbers with some values changed. */
export function changed(numbers: ModelNumbers, edits: DemoStory["drift"] = {}): ModelNumbers {
  return Object.fromEntries(Object.entries(numbers).map(([axis, own]) => [axis, { ...own, ...edits[axis] }]));
}
