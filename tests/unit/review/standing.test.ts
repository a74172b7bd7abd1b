import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Layer, ReadingKind } from "@/lib/domain/readings";
import type { ParameterValue } from "@/lib/domain/values";
import { countedValues, standingReadings, type ReadingFact } from "@/lib/review/standing";

const day = (number: number, hour = 8) => new Date(Date.UTC(2026, 0, number, hour));
const LATER = day(28);

let counter = 0;
function reading(
  kind: ReadingKind,
  layer: Layer,
  readAt: Date,
  more: Partial<Pick<ReadingFact, "firmwareVersion" | "receivedAt" | "id">> = {},
): ReadingFact {
  counter += 1;
  return { id: `r${counter}`, kind, layer, readAt, receivedAt: readAt, firmwareVersion: null, ...more };
}

describe("standingReadings", () => {
  it("lets the newest of each layer stand", () => {
    const file = reading("as_found", "file", day(1));
    const older = reading("in_service", "stored", day(2));
    const newer = reading("in_service", "stored", day(3));
    const standing = standingReadings([newer, file, older], LATER);
    expect(standing.byLayer).toEqual({ file, stored: newer });
    expect(standing.replaced).toEqual([{ reading: older, because: "newer", by: newer }]);
    expect(standing.expired).toEqual([]);
  });

  it("expires its own and higher layers with an as-left reading, and leaves the lower ones", () => {
    const file = reading("as_found", "file", day(1));
    const stored = reading("as_found", "stored", day(1));
    const running = reading("in_service", "running", day(2));
    const left = reading("as_left", "stored", day(3));
    const standing = standingReadings([file, stored, running, left], LATER);
    expect(standing.byLayer).toEqual({ file, stored: left });
    expect(standing.expired).toEqual([
      { reading: stored, because: "as_left", by: left },
      { reading: running, because: "as_left", by: left },
    ]);
  });

  it("asks for a read-back after an as-left file: stored and running are not read any more", () => {
    const stored = reading("in_service", "stored", day(1));
    const running = reading("in_service", "running", day(1));
    const left = reading("as_left", "file", day(2));
    expect(standingReadings([stored, running, left], LATER).byLayer).toEqual({ file: left });
  });

  it("keeps two layers that were read as-left at one moment, in whichever order they arrive", () => {
    const stored = reading("as_left", "stored", day(2), { receivedAt: day(2, 9) });
    const file = reading("as_left", "file", day(2), { receivedAt: day(2, 10) });
    expect(standingReadings([file, stored], LATER).byLayer).toEqual({ file, stored });
  });

  it("expires everything with another firmware, whatever the layer", () => {
    const file = reading("as_left", "file", day(1), { firmwareVersion: "4.1" });
    const stored = reading("in_service", "stored", day(2), { firmwareVersion: "4.1" });
    const running = reading("in_service", "running", day(3), { firmwareVersion: "4.2" });
    const standing = standingReadings([file, stored, running], LATER);
    expect(standing.byLayer).toEqual({ running });
    expect(standing.expired.map(({ because }) => because)).toEqual(["firmware", "firmware"]);
  });

  it("compares with the last known firmware, not with a reading that did not record it", () => {
    const file = reading("as_left", "file", day(1), { firmwareVersion: "4.1" });
    const unknown = reading("in_service", "stored", day(2));
    const same = reading("in_service", "running", day(3), { firmwareVersion: " 4.1 " });
    expect(standingReadings([file, unknown, same], LATER).byLayer).toEqual({
      file,
      stored: unknown,
      running: same,
    });
    const first = reading("in_service", "stored", day(1));
    const known = reading("in_service", "running", day(2), { firmwareVersion: "4.1" });
    expect(standingReadings([first, known], LATER).byLayer).toEqual({ stored: first, running: known });
  });

  it("orders by the time read, so that a late arrival changes only what it may", () => {
    const stored = reading("in_service", "stored", day(5));
    const late = reading("as_left", "file", day(3), { receivedAt: day(20) });
    expect(standingReadings([stored, late], LATER).byLayer).toEqual({ file: late, stored });
    const corrected = reading("in_service", "stored", day(5), { receivedAt: day(21) });
    expect(standingReadings([corrected, stored, late], LATER).byLayer.stored).toBe(corrected);
  });

  it("answers for an earlier date with what had been read by then", () => {
    const stored = reading("in_service", "stored", day(1));
    const left = reading("as_left", "file", day(10));
    expect(standingReadings([stored, left], day(9)).byLayer).toEqual({ stored });
    expect(standingReadings([stored, left], day(10)).byLayer).toEqual({ file: left });
    expect(standingReadings([], LATER)).toEqual({ byLayer: {}, expired: [], replaced: [] });
  });
});

const anyReading = fc
  .record({
    kind: fc.constantFrom<ReadingKind>("as_found", "as_left", "in_service"),
    layer: fc.constantFrom<Layer>("file", "stored", "running"),
    at: fc.integer({ min: 1, max: 5 }),
    received: fc.integer({ min: 1, max: 9 }),
    firmwareVersion: fc.constantFrom(null, "1", "2"),
  })
  .map(({ at, received, ...rest }) => ({ ...rest, readAt: day(at), receivedAt: day(at, received) }));

describe("laws of standingReadings", () => {
  const history = fc
    .array(anyReading, { maxLength: 8 })
    .map((list) => list.map((item, index) => ({ ...item, id: `r${index}` })));

  it("does not depend on the order in which readings come", () => {
    fc.assert(
      fc.property(
        history.chain((list) =>
          fc.tuple(fc.constant(list), fc.shuffledSubarray(list, { minLength: list.length })),
        ),
        ([list, shuffled]) => {
          expect(standingReadings(shuffled, LATER)).toEqual(standingReadings(list, LATER));
        },
      ),
    );
  });

  it("accounts for every reading once, and the last one read always stands", () => {
    fc.assert(
      fc.property(history, (list) => {
        const { byLayer, expired, replaced } = standingReadings(list, LATER);
        const accounted = [...Object.values(byLayer), ...[...expired, ...replaced].map((end) => end.reading)];
        expect(accounted.map(({ id }) => id).sort()).toEqual(list.map(({ id }) => id).sort());
        const last = [...list].sort(
          (a, b) => +b.readAt - +a.readAt || +b.receivedAt - +a.receivedAt || (a.id < b.id ? 1 : -1),
        )[0];
        if (last) expect(byLayer[last.layer]).toEqual(last);
      }),
    );
  });
});

function value(axis: string | null, parameter: ParameterValue["parameter"], number: number): ParameterValue {
  const source = {
    path: "a.conf",
    line: 1,
    column: 1,
    start: 0,
    end: 1,
    raw: String(number),
    key: parameter,
  };
  return {
    axis,
    parameter,
    value: number,
    unit: "",
    basis: null,
    typed: { value: number, unit: null },
    source,
  };
}

describe("countedValues", () => {
  it("counts the highest layer that has the value, and keeps the others beside it", () => {
    const file = reading("as_left", "file", day(1));
    const stored = reading("in_service", "stored", day(2));
    const running = reading("in_service", "running", day(3));
    const counted = countedValues([
      { reading: running, parameters: [value("X", "microsteps", 64)] },
      { reading: file, parameters: [value("x", "microsteps", 16), value("x", "max_speed", 0.3)] },
      { reading: stored, parameters: [value("x", "microsteps", 32), value(null, "max_step_rate", 1e5)] },
    ]);
    expect(
      counted.map(({ axis, parameter, layer, readingId }) => [axis, parameter, layer, readingId]),
    ).toEqual([
      ["X", "microsteps", "running", running.id],
      ["x", "max_speed", "file", file.id],
      [null, "max_step_rate", "stored", stored.id],
    ]);
    expect(counted[0]?.value.value).toBe(64);
    expect(counted[0]?.layers.map((layer) => layer.value.value)).toEqual([16, 32, 64]);
    expect(counted[0]?.readAt).toEqual(day(3));
  });

  it("counts nothing where nothing was read", () => {
    expect(countedValues([])).toEqual([]);
  });
});
