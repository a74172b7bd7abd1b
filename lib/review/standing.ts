import { parameterRank, type ParameterName } from "@/lib/domain/parameters";
import { LAYERS, layerRank, type Layer, type ReadingKind } from "@/lib/domain/readings";
import type { ParameterValue } from "@/lib/domain/values";
import { parameterKey } from "./axis-word";

/** What must be known of a reading to say whether it still stands. */
export interface ReadingFact {
  readonly id: string;
  readonly kind: ReadingKind;
  readonly layer: Layer;
  /** When the machine was read. */
  readonly readAt: Date;
  /** When the reading came in; only breaks a tie of `readAt`. */
  readonly receivedAt: Date;
  /** Null where it was not recorded. */
  readonly firmwareVersion: string | null;
}

/** A reading that no longer says anything about the machine, and what ended it. */
export interface EndedReading<R extends ReadingFact = ReadingFact> {
  readonly reading: R;
  /** `newer`: a later reading of the same layer took its place; the other two leave the layer *not read*. */
  readonly because: "newer" | "as_left" | "firmware";
  readonly by: R;
}

export interface Standing<R extends ReadingFact = ReadingFact> {
  /** The reading that counts in each layer; a layer without one is not read. */
  readonly byLayer: Partial<Record<Layer, R>>;
  /** Ended by work on the machine or by another firmware, oldest first. */
  readonly expired: readonly EndedReading<R>[];
  /** Ended by a newer reading of the same layer, oldest first. */
  readonly replaced: readonly EndedReading<R>[];
}

/**
 * Which readings count at `asOf`. In order of the time read: the newest of each layer stands; an as-left reading
 * expires earlier readings of its own and higher layers; a firmware version other than the last known one expires
 * all earlier readings. Readings may arrive in any order, and the answer does not depend on it.
 */
export function standingReadings<R extends ReadingFact>(readings: readonly R[], asOf: Date): Standing<R> {
  const standing = new Map<Layer, R>();
  const expired: EndedReading<R>[] = [];
  const replaced: EndedReading<R>[] = [];
  let firmware: string | null = null;
  const end = (reading: R, because: EndedReading["because"], by: R) => {
    (because === "newer" ? replaced : expired).push({ reading, because, by });
    standing.delete(reading.layer);
  };
  for (const reading of inOrderOfTime(readings, asOf)) {
    const version = reading.firmwareVersion?.trim() || null;
    const reflashed = version !== null && firmware !== null && version !== firmware;
    for (const earlier of [...standing.values()]) {
      const because = whatEnds(earlier, reading, reflashed);
      if (because !== null) end(earlier, because, reading);
    }
    standing.set(reading.layer, reading);
    firmware = version ?? firmware;
  }
  return { byLayer: Object.fromEntries(standing), expired, replaced };
}

function inOrderOfTime<R extends ReadingFact>(readings: readonly R[], asOf: Date): R[] {
  return readings
    .filter((reading) => reading.readAt.getTime() <= asOf.getTime())
    .sort(
      (a, b) =>
        a.readAt.getTime() - b.readAt.getTime() ||
        a.receivedAt.getTime() - b.receivedAt.getTime() ||
        (a.id < b.id ? -1 : 1),
    );
}

/** Two layers read at one moment belong together: neither expires the other. */
function whatEnds(
  earlier: ReadingFact,
  reading: ReadingFact,
  reflashed: boolean,
): EndedReading["because"] | null {
  if (reflashed) return "firmware";
  const together = earlier.readAt.getTime() === reading.readAt.getTime();
  const reaches = layerRank(earlier.layer) >= layerRank(reading.layer);
  if (reading.kind === "as_left" && reaches && !together) return "as_left";
  return earlier.layer === reading.layer ? "newer" : null;
}

/** A standing reading with the parameters that its text holds. */
export interface LayerReading {
  readonly reading: ReadingFact;
  readonly parameters: readonly ParameterValue[];
}

/** The value of one parameter in one layer. */
export interface LayerValue {
  readonly layer: Layer;
  readonly readingId: string;
  readonly readAt: Date;
  readonly value: ParameterValue;
}

/** What counts on the machine for one parameter: the value of the highest layer that has one. */
export interface CountedValue extends LayerValue {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  /** Every layer that holds the parameter, lowest first; the last one is what counts. */
  readonly layers: readonly LayerValue[];
}

/** The value that counts for each parameter, by axis as they first appear and in the order of the parameter list. */
export function countedValues(readings: readonly LayerReading[]): CountedValue[] {
  const byParameter = new Map<string, LayerValue[]>();
  for (const layer of LAYERS)
    for (const { reading, parameters } of readings.filter(({ reading: { layer: own } }) => own === layer))
      for (const value of parameters) {
        const found = { layer, readingId: reading.id, readAt: reading.readAt, value };
        byParameter.set(parameterKey(value), [...(byParameter.get(parameterKey(value)) ?? []), found]);
      }
  return inParameterOrder([...byParameter.values()].flatMap(toCounted));
}

function toCounted(layers: readonly LayerValue[]): CountedValue[] {
  const highest = layers.at(-1);
  if (!highest) return [];
  return [{ ...highest, axis: highest.value.axis, parameter: highest.value.parameter, layers }];
}

/** By axis in order of appearance (the machine's own last), then as the parameter list has them. */
function inParameterOrder(values: readonly CountedValue[]): CountedValue[] {
  const axes = [...new Set(values.map(({ axis }) => axis?.toLowerCase() ?? null))];
  const place = ({ axis }: CountedValue) => (axis === null ? axes.length : axes.indexOf(axis.toLowerCase()));
  return [...values].sort(
    (a, b) => place(a) - place(b) || parameterRank(a.parameter) - parameterRank(b.parameter),
  );
}
