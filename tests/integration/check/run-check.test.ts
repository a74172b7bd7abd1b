import { beforeAll, describe, expect, test } from "vitest";
import { checkRequestSchema, type CheckRequest } from "@/lib/schemas/check";
import { runCheck } from "@/lib/services/check/run";
import type { Context } from "@/lib/services/kernel/context";
import { Evaluation, FileContent, Reading } from "@/models/revisions";
import { RecordEvent } from "@/models/record";
import { configuration, fleet, type Fleet } from "@/tests/support/fleet";

let world: Fleet;
let viewer: Context;
beforeAll(async () => {
  world = await fleet();
  viewer = world.viewer;
});

/** The documented request, with a text of ours. */
function documented(): CheckRequest {
  return {
    files: [{ path: "gantry.conf", text: "[axis.x]\nrun_ma = 800\naccel = 1500\nfoo = 3\n" }],
    format: "auto",
    keyTable: {
      rules: [
        { key: "axis.{axis}.run_ma", parameter: "run_current", unit: "mA", basis: "rms" },
        { key: "axis.{axis}.accel", parameter: "acceleration", unit: "mm/s^2" },
      ],
    },
    assembly: {
      ambient_c: 35,
      enclosure_rise_k: 5,
      supply: { voltage_v: 24, tolerance: 0.05, rated_power_w: 150, bus_capacitance_uf: 1000 },
      controller_board: { max_step_rate_hz: 100000 },
      axes: [
        {
          axis: "x",
          motor: {
            rated_current_a: 1.5,
            rated_current_basis: "rms",
            resistance_ohm: 2.1,
            inductance_mh: 3.0,
            holding_torque_nm: 0.45,
            rotor_inertia_gcm2: 54,
            step_angle_deg: 1.8,
            winding_limit_c: 130,
            winding_to_ambient_k_per_w: 8.5,
            case_to_ambient_k_per_w: 7.0,
          },
          driver: {
            max_current_a: 2.0,
            max_current_basis: "rms",
            set_point: { method: "reference_voltage", gain: 8, basis: "peak", sense_resistance_ohm: 0.1 },
          },
          drive_train: { kind: "belt", pitch_mm: 2, teeth: 20 },
          load: { mass_kg: 0.6, friction_n: 4, incline_deg: 0 },
          travel_mm: 400,
        },
      ],
    },
    policy: { torque_margin_below_limit_speed: 0.5, junction_limit_c: 125 },
  };
}

const pointersOf = (request: unknown) => {
  const parsed = checkRequestSchema.safeParse(request);
  return parsed.success
    ? []
    : parsed.error.issues.map(({ path, message }) => [`/${path.join("/")}`, message]);
};

describe("the documented request", () => {
  test("is answered in the documented shape, and nothing is stored", async () => {
    const counts = async () => [
      await Reading.count(),
      await FileContent.count(),
      await Evaluation.count(),
      await RecordEvent.count(),
    ];
    const before = await counts();
    const answer = await runCheck(viewer, documented());
    expect(answer.documents).toEqual([{ path: "gantry.conf", format: "lines", entries: 3, diagnostics: [] }]);
    expect(answer.parameters[0]).toMatchObject({
      axis: "x",
      parameter: "run_current",
      value: 0.8,
      unit: "A",
      basis: "rms",
      source: { path: "gantry.conf", line: 2, column: 10, raw: "800" },
    });
    expect(answer.unmapped).toMatchObject([{ path: "gantry.conf", line: 4, key: "axis.x.foo" }]);
    expect(answer.quantities).toContainEqual({
      axis: "x",
      name: "winding_current_rms",
      value: 0.8,
      unit: "A",
    });
    const finding = answer.findings.find(({ ruleId }) => ruleId === "run-current-motor");
    expect(finding).toMatchObject({
      level: "within",
      axis: "x",
      value: 0.8,
      limit: 1.5,
      unit: "A",
      needs: [],
    });
    expect(finding?.margin).toBeCloseTo(0.875, 9);
    expect(finding?.spans[0]).toMatchObject({ path: "gantry.conf", line: 2, column: 10 });
    expect(answer.versions.policy).toMatch(/sent/);
    expect(await counts()).toEqual(before);
  });

  test("keeps its meaning when members are unknown, null or left out", async () => {
    const request = documented();
    const plain = await runCheck(viewer, request);
    const noisy = structuredClone(request) as Record<string, never> & CheckRequest;
    Object.assign(noisy, { colour: "green" });
    Object.assign((noisy.assembly as { axes: { motor: object }[] }).axes[0]!.motor, {
      detent_torque_nm: null,
      maker: "unknown",
    });
    expect((await runCheck(viewer, noisy)).findings).toEqual(plain.findings);
  });

  test("names a datum that is missing instead of guessing it", async () => {
    const request = documented();
    const { axes } = request.assembly as { axes: { motor: { rated_current_a?: number } }[] };
    delete axes[0]!.motor.rated_current_a;
    const { findings } = await runCheck(viewer, request);
    expect(findings.find(({ ruleId }) => ruleId === "run-current-motor")).toMatchObject({
      level: "cannot",
      needs: ["axes.x.motor.rated_current_a"],
    });
  });

  test("takes bytes as base64 and recognises their encoding", async () => {
    const request = documented();
    const text = "# d\xfcse\n[axis.x]\nrun_ma = 800\n";
    request.files = [{ path: "gantry.conf", base64: Buffer.from(text, "latin1").toString("base64") }];
    expect((await runCheck(viewer, request)).parameters[0]).toMatchObject({
      value: 0.8,
      source: { line: 3 },
    });
  });
});

describe("what is stored", () => {
  test("serves where nothing is sent: a machine's own hardware and its model's key table", async () => {
    const files = [{ path: "machine.conf", text: configuration() }];
    const { parameters, findings } = await runCheck(viewer, { files, machineId: world.machineId });
    expect(parameters.map(({ axis }) => axis)).toEqual(expect.arrayContaining(["x", "y"]));
    expect(findings.find(({ ruleId }) => ruleId === "driver-junction")?.level).not.toBe("cannot");
  });

  test("a model without a site has no ambient", async () => {
    const files = [{ path: "machine.conf", text: configuration() }];
    const { findings } = await runCheck(viewer, { files, machineModelId: world.modelId });
    const winding = findings.find(({ ruleId, axis }) => ruleId === "winding-temperature" && axis === "x");
    expect(winding?.level).toBe("cannot");
    expect(winding?.needs).toContain("ambient_c");
  });

  test("gives way to what is sent", async () => {
    const files = [{ path: "machine.conf", text: configuration() }];
    const keyTable = {
      rules: [
        {
          key: "axis.x.run_ma",
          axis: "x",
          parameter: "run_current" as const,
          unit: "mA",
          basis: "peak" as const,
        },
      ],
    };
    const { parameters } = await runCheck(viewer, { files, keyTable, machineId: world.machineId });
    expect(parameters).toHaveLength(1);
    expect(parameters[0]?.basis).toBe("peak");
    const { assembly } = documented();
    const sent = await runCheck(viewer, { files, assembly, machineId: world.machineId });
    expect(new Set(sent.findings.map(({ axis }) => axis))).toEqual(new Set(["x", null]));
  });

  test("a machine that is not there is not found", async () => {
    const files = [{ path: "machine.conf", text: configuration() }];
    const machineId = "00000000-0000-4000-8000-000000000000";
    await expect(runCheck(viewer, { files, machineId })).rejects.toMatchObject({ code: "not_found" });
  });
});

describe("a request that does not fit is refused at its field", () => {
  const broken = (change: (request: Record<string, unknown>) => void) => {
    const request = structuredClone(documented()) as unknown as Record<string, unknown>;
    change(request);
    return pointersOf(request);
  };
  type Any = { axes: { motor: Record<string, unknown>; axis: string }[] };

  test.each([
    [
      "a negative rated current",
      (r: Record<string, unknown>) => ((r.assembly as Any).axes[0]!.motor.rated_current_a = -1),
      "/assembly/axes/0/motor/rated_current_a",
    ],
    [
      "a text in place of a number",
      (r: Record<string, unknown>) => ((r.assembly as Any).axes[0]!.motor.resistance_ohm = "2.1"),
      "/assembly/axes/0/motor/resistance_ohm",
    ],
    [
      "an unknown unit",
      (r: Record<string, unknown>) =>
        (r.keyTable = { rules: [{ key: "a", parameter: "max_speed", unit: "furlong" }] }),
      "/keyTable/rules/0/unit",
    ],
    [
      "an unknown parameter",
      (r: Record<string, unknown>) => (r.keyTable = { rules: [{ key: "a", parameter: "colour" }] }),
      "/keyTable/rules/0/parameter",
    ],
    ["no hardware at all", (r: Record<string, unknown>) => delete r.assembly, "/assembly"],
    ["no key table at all", (r: Record<string, unknown>) => delete r.keyTable, "/keyTable"],
    ["no files", (r: Record<string, unknown>) => (r.files = []), "/files"],
    [
      "a file with both text and base64",
      (r: Record<string, unknown>) => (r.files = [{ path: "a", text: "b", base64: "" }]),
      "/files/0",
    ],
    [
      "two axes of one name",
      (r: Record<string, unknown>) => (r.assembly = { axes: [{ axis: "x" }, { axis: "X" }] }),
      "/assembly/axes/1/axis",
    ],
    [
      "a margin out of range",
      (r: Record<string, unknown>) => (r.policy = { junction_limit_c: 900 }),
      "/policy/junction_limit_c",
    ],
  ])("%s", (_, change, pointer) => {
    expect(broken(change).map(([at]) => at)).toContain(pointer);
  });

  test("the sentence names an unknown unit", () => {
    const [issue] = broken(
      (r) => (r.keyTable = { rules: [{ key: "a", parameter: "max_speed", unit: "furlong" }] }),
    );
    expect(issue?.[1]).toContain("furlong");
  });

  test("a format that is not read here is named", async () => {
    await expect(runCheck(viewer, { ...documented(), format: "runes" })).rejects.toMatchObject({
      code: "invalid",
      pointer: "/format",
      message: expect.stringContaining("runes"),
    });
  });

  test("an empty file is refused", async () => {
    const files = [{ path: "empty.conf", text: "" }];
    await expect(runCheck(viewer, { ...documented(), files })).rejects.toMatchObject({
      code: "invalid",
      pointer: "/files/0/text",
    });
  });
});
