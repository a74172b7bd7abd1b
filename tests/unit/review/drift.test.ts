import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Layer } from "@/lib/domain/readings";
import { driftOf } from "@/lib/review/drift";
import type { Drift } from "@/lib/review/drift-types";
import { countedValues, type LayerReading } from "@/lib/review/standing";
import { ASSEMBLY, POLICY, TEXT, check, edited, withoutField } from "./support/gantry";

const NOW = new Date(Date.UTC(2026, 5, 30));
const daysAgo = (days: number) => new Date(NOW.getTime() - days * 86_400_000);

function layer(text: string, own: Layer = "stored", readAt = daysAgo(1)): LayerReading {
  const reading = {
    id: `reading-${own}`,
    kind: "in_service" as const,
    layer: own,
    readAt,
    receivedAt: readAt,
    firmwareVersion: null,
  };
  return { reading, parameters: check(text).parameters };
}

function drift(layers: LayerReading[], { text = TEXT, assembly = ASSEMBLY } = {}): Drift {
  const required = check(text, { assembly });
  return driftOf({ required, counted: countedValues(layers), assembly, policy: POLICY, asOf: NOW });
}

describe("driftOf", () => {
  it("finds a machine that reads as required on baseline", () => {
    expect(drift([layer(TEXT)])).toMatchObject({ level: null, items: [], sentence: "on baseline" });
    const inOtherWords = edited(
      "x",
      "vmax = 300 ",
      "vmax = 0.3 m/s ",
      edited("x", "acc = 6000", "acc = 6e3"),
    );
    expect(drift([layer(inOtherWords)]).level).toBeNull();
  });

  it("says what a low current costs, with the numbers of both evaluations", () => {
    const low = edited("x", "amps = 0.85", "amps = 0.2");
    const { level, items, sentence } = drift([layer(low)]);
    expect(level).toBe("over");
    expect(items).toHaveLength(1);
    const [was, toBe] = [check(TEXT), check(low)].map(
      ({ quantities }) =>
        quantities.find(({ axis, name }) => axis === "x" && name === "torque_margin")?.value ?? NaN,
    );
    expect(sentence).toBe(`X torque margin ${was?.toFixed(2)} → ${toBe?.toFixed(2)}`);
    expect(items[0]).toMatchObject({
      kind: "differs",
      axis: "x",
      parameter: "run_current",
      required: { value: 0.85 },
      actual: { value: 0.2 },
      layer: "stored",
      readingId: "reading-stored",
      staleDays: null,
      share: expect.closeTo(-0.765, 3),
      level: "over",
    });
  });

  it("warns of a load that may fall, as a share of the load", () => {
    // Holding torque 0.45 N·m · 0.1/1.5 = 0.03 N·m against 8 kg · 9.80665 · 8 mm/2π = 0.0999 N·m.
    const { level, sentence } = drift([layer(edited("z", "standby = 1.0", "standby = 0.1"))]);
    expect(level).toBe("over");
    expect(sentence).toBe("Z hold 0.3 of the load: may fall");
  });

  it("says by how much parts come out short", () => {
    const { level, sentence } = drift([layer(edited("x", "steps_mm = 80", "steps_mm = 79.76"))]);
    expect([level, sentence]).toEqual(["near", "X parts 0.3 % short"]);
    const doubled = drift([layer(edited("x", "subdivide = 16", "subdivide = 32"))]);
    expect([doubled.level, doubled.sentence]).toEqual(["over", "X moves 0.5 times as far"]);
  });

  it("calls a drift without consequence within limits", () => {
    const slower = drift([layer(edited("z", "vmax = 20", "vmax = 15"))]);
    expect([slower.level, slower.sentence]).toEqual(["within", "Z slower, no other effect"]);
    const corner = drift([layer(edited("x", "corner = 12", "corner = 13"))]);
    expect([corner.level, corner.sentence]).toEqual([
      "within",
      "X corner speed 12 → 13 mm/s, no effect on a limit",
    ]);
  });

  it("never calls within limits what no check could judge", () => {
    const assembly = withoutField("x", "motor", "rotor_inertia_gcm2");
    const { level, sentence } = drift([layer(edited("x", "corner = 12", "corner = 13"))], { assembly });
    expect([level, sentence]).toEqual(["cannot", "X corner speed 12 → 13 mm/s, cannot be checked"]);
  });

  it("warns of an axis that runs the other way, which no limit covers", () => {
    const text = edited("x", "colour = grey", "reversed = no");
    const { level, sentence } = drift([layer(edited("x", "colour = grey", "reversed = yes"))], { text });
    expect([level, sentence]).toEqual(["near", "X runs the other way"]);
  });

  it("lets a stored value beat the file's, though the file is as required", () => {
    const stored = layer("[axis.x]\namps = 0.2\n", "stored");
    const { items, level } = drift([layer(TEXT, "file"), stored]);
    expect(level).toBe("over");
    expect(items.map(({ parameter, layer: own }) => [parameter, own])).toEqual([["run_current", "stored"]]);
    expect(
      drift([layer(edited("x", "amps = 0.85", "amps = 0.2"), "file"), layer(TEXT, "stored")]).level,
    ).toBeNull();
  });

  it("never finds a machine on baseline that was not read on some parameter", () => {
    const { level, items, sentence } = drift([layer(TEXT.replace("corner = 1  ", "# corner = 1  "))]);
    expect([level, sentence]).toEqual(["cannot", "Z corner speed not read"]);
    expect(items).toMatchObject([
      { kind: "not_read", axis: "z", parameter: "corner_speed", actual: null, share: null },
    ]);
    expect(drift([layer(TEXT.slice(0, TEXT.indexOf("[axis.z]")))]).sentence).toBe("Z not read");
    expect(drift([]).sentence).toBe("not read");
  });

  it("says how long ago a stale reading was", () => {
    const stale = drift([layer(TEXT, "stored", daysAgo(40))]);
    expect([stale.level, stale.sentence]).toEqual(["cannot", "not read for 40 days"]);
    expect(stale.items.every(({ kind, staleDays }) => kind === "stale" && staleDays === 40)).toBe(true);
    const onZ = [
      layer(TEXT.slice(TEXT.indexOf("[axis.z]")), "file", daysAgo(40)),
      layer(TEXT.slice(0, TEXT.indexOf("[axis.z]")), "stored", daysAgo(2)),
    ];
    expect(drift(onZ).sentence).toBe("Z not read for 40 days");
    expect(drift([layer(TEXT, "stored", daysAgo(30))]).level).toBeNull();
  });

  it("lets a grave consequence outrank that it was read long ago, and a harmless one not", () => {
    const low = drift([layer(edited("x", "amps = 0.85", "amps = 0.2"), "stored", daysAgo(40))]);
    expect(low.level).toBe("over");
    expect(low.sentence).toMatch(/^X torque margin .* → .*, read 40 days ago$/);
    const slow = drift([layer(edited("z", "vmax = 20", "vmax = 15"), "stored", daysAgo(40))]);
    expect([slow.level, slow.sentence]).toEqual(["cannot", "Z slower, no other effect, read 40 days ago"]);
  });

  it("lays a consequence to the drifted value that brings it about, not to its neighbours", () => {
    const both = edited("x", "corner = 12", "corner = 13", edited("x", "amps = 0.85", "amps = 0.2"));
    const { items } = drift([layer(both)]);
    expect(items.map(({ parameter, level }) => [parameter, level])).toEqual([
      ["run_current", "over"],
      ["corner_speed", "within"],
    ]);
  });

  it("ranks one value with a consequence above several without", () => {
    const text = edited("z", "acc = 200", "acc = 150", edited("z", "vmax = 20", "vmax = 15"));
    const { items, sentence } = drift([layer(edited("z", "standby = 1.0", "standby = 0.1", text))]);
    expect(items.map(({ level }) => level)).toEqual(["over", "within", "within"]);
    expect(sentence).toMatch(/may fall$/);
  });

  it("finds what a value does that nothing requires, and leaves it alone where it does nothing", () => {
    const text = edited("z", "standby = 1.0", "# standby = 1.0");
    const { items } = drift([layer(edited("z", "standby = 1.0", "standby = 0.1"))], { text });
    expect(items).toMatchObject([{ parameter: "hold_current", required: null, share: null, level: "over" }]);
    expect(drift([layer(TEXT)], { text }).level).toBeNull();
  });

  it("has nothing to compare with where nothing is required", () => {
    expect(drift([layer(TEXT)], { text: "" })).toMatchObject({
      level: "cannot",
      sentence: "no required value to compare with",
    });
  });
});

describe("laws of driftOf", { timeout: 60_000 }, () => {
  const number = fc.integer({ min: 5, max: 300 }).map((percent) => percent / 100);

  it("finds no drift of a configuration from itself, whatever its numbers", () => {
    fc.assert(
      fc.property(number, number, number, (current, speed, acceleration) => {
        const text = edited(
          "x",
          "amps = 0.85",
          `amps = ${0.85 * current}`,
          edited(
            "x",
            "vmax = 300",
            `vmax = ${300 * speed}`,
            edited("z", "acc = 200", `acc = ${200 * acceleration}`),
          ),
        );
        expect(drift([layer(text)], { text })).toMatchObject({ level: null, items: [] });
      }),
      { numRuns: 30 },
    );
  });

  it("is never off baseline without an item, and its level is the gravest of them", () => {
    fc.assert(
      fc.property(number, number, (current, speed) => {
        const text = edited("x", "amps = 0.85", `amps = ${0.85 * current}`);
        const { level, items } = drift([layer(edited("x", "vmax = 300", `vmax = ${300 * speed}`, text))]);
        expect(items.length).toBe(Number(current !== 1) + Number(speed !== 1));
        expect(level).toBe(items[0]?.level ?? null);
        for (const item of items) expect(Math.abs(item.share ?? 2)).toBeLessThanOrEqual(1);
      }),
      { numRuns: 30 },
    );
  });
});
