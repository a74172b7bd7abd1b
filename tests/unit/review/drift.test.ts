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

/**
 * Motor case of X in °C at a run current in A rms: copper loss P = 2·I²·R·(234.5 + T)/254.5 with the winding at
 * T = 25 + 8.5·P, solved for T; case 25 + 7·P.
 */
function caseAt(current: number): number {
  const loss = (2 * current ** 2 * 2.1) / 254.5;
  const winding = (25 + 8.5 * loss * 234.5) / (1 - 8.5 * loss);
  return 25 + 7 * loss * (234.5 + winding);
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

  it("lays what values do only together to each of them", () => {
    const weaker = edited("x", "amps = 0.85", "amps = 0.35");
    const faster = edited("x", "acc = 6000", "acc = 12000");
    expect([drift([layer(weaker)]).level, drift([layer(faster)]).level]).toEqual(["within", "within"]);
    const both = drift([layer(edited("x", "acc = 6000", "acc = 12000", weaker))]);
    expect(both.items.map(({ parameter, level }) => [parameter, level])).toEqual([
      ["run_current", "over"],
      ["acceleration", "over"],
    ]);
    expect(both.sentence).toMatch(/^X torque margin/);
  });

  it("takes what values do together for the truth where one makes up for the other", () => {
    const low = edited("x", "amps = 0.85", "amps = 0.4");
    const { level, items } = drift([layer(edited("x", "acc = 6000", "acc = 1000", low))]);
    expect([level, items.length]).toEqual(["within", 2]);
  });

  it("says so where a limit that was passed already is passed further, and not where it is passed less", () => {
    const text = edited("x", "amps = 0.85", "amps = 1.45");
    const more = drift([layer(edited("x", "amps = 0.85", "amps = 1.49"))], { text });
    expect([more.level, more.sentence]).toEqual([
      "over",
      `X motor case ${caseAt(1.45).toFixed(0)} → ${caseAt(1.49).toFixed(0)} °C`,
    ]);
    expect(drift([layer(TEXT)], { text })).toMatchObject({
      level: "within",
      sentence: "X run current 1.45 → 0.85 A rms, no effect on a limit",
    });
  });

  it("knows the brake that holds a load", () => {
    const [x, z] = ASSEMBLY.axes;
    const assembly = { ...ASSEMBLY, axes: [x!, { ...z!, load: { ...z?.load, holding_brake: true } }] };
    const { level, sentence } = drift([layer(edited("z", "standby = 1.0", "standby = 0.1"))], { assembly });
    expect([level, sentence]).toEqual(["near", "Z hold 0.3 of the load: the brake alone holds it"]);
  });

  it("names the check in words where its value has no name of its own", () => {
    const { level, sentence } = drift([layer(edited("x", "vmax = 300", "vmax = 20"))]);
    expect([level, sentence]).toEqual([
      "near",
      "X maximum speed 300 → 20 mm/s: cruising at a resonance near limit",
    ]);
  });

  it("says where no check rests on a value", () => {
    const { level, sentence } = drift([layer(TEXT.replace("supply = 24 V", "supply = 36 V"))]);
    expect([level, sentence]).toEqual(["within", "Supply voltage 24 → 36 V, no check rests on it"]);
  });

  it("compares a hold current in per cent with one in amperes as currents", () => {
    const text = edited("x", "amps = 0.85", "amps = 1.0");
    expect(
      drift([layer(edited("x", "standby = 0.5   # A", "standby = 50 %", text))], { text }).level,
    ).toBeNull();
    const { items } = drift([layer(edited("x", "standby = 0.5   # A", "standby = 40 %", text))], { text });
    expect(items[0]).toMatchObject({ parameter: "hold_current", share: expect.closeTo(-0.2, 9) });
  });

  it("asks for the basis of a current that was read without one", () => {
    const reading = layer(TEXT);
    const parameters = reading.parameters.map((value) =>
      value.axis === "x" && value.parameter === "run_current" ? { ...value, basis: null } : value,
    );
    const { level, sentence } = drift([{ ...reading, parameters }]);
    expect([level, sentence]).toEqual(["cannot", "X run current has no basis, peak or rms"]);
  });

  it("counts the parameters of an axis that were not read, and joins axes", () => {
    const few = TEXT.replace("vmax = 20 ", "# vmax = 20 ").replace("acc = 200 ", "# acc = 200 ");
    expect(drift([layer(few)]).sentence).toBe("2 parameters of Z not read");
    const machineOnly = TEXT.slice(0, TEXT.indexOf("[axis.x]"));
    expect(drift([layer(machineOnly)]).sentence).toBe("X and Z not read");
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
