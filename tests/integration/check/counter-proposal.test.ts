import { beforeAll, expect, test } from "vitest";
import type { CheckRequest } from "@/lib/schemas/check";
import { counterAnswerSchema } from "@/lib/schemas/counter-proposal";
import { counterPropose } from "@/lib/services/check/counter-proposal";
import { runCheck } from "@/lib/services/check/run";
import type { Context } from "@/lib/services/kernel/context";
import { FileContent } from "@/models/revisions";
import { person } from "@/tests/support/world";
import { exampleAssembly } from "@/tests/unit/rules/world";

let viewer: Context;
beforeAll(async () => {
  viewer = await person("viewer");
});

const TEXT = "[axis.x]\r\nrun_ma = 1900   # per winding\r\nmicro = 16\r\naccel = 3000\r\nspeed = 300\r\n";

function request(text: string): CheckRequest {
  return {
    files: [{ path: "gantry.conf", text }],
    format: "auto",
    keyTable: {
      rules: [
        { key: "axis.{axis}.run_ma", parameter: "run_current", unit: "mA", basis: "rms" },
        { key: "axis.{axis}.micro", parameter: "microsteps" },
        { key: "axis.{axis}.accel", parameter: "acceleration", unit: "mm/s^2" },
        { key: "axis.{axis}.speed", parameter: "max_speed", unit: "mm/s" },
      ],
    },
    assembly: exampleAssembly(),
  };
}

const overIn = async (text: string) =>
  (await runCheck(viewer, request(text))).findings.filter(({ level }) => level === "over");

test("answers the smallest change as a text that the check then finds nothing over limit in", async () => {
  expect((await overIn(TEXT)).length).toBeGreaterThan(0);
  const answer = counterAnswerSchema.parse(await counterPropose(viewer, request(TEXT)));
  const text = answer.files[0]?.text ?? "";
  expect(await overIn(text)).toEqual([]);
  expect(answer).toMatchObject({ left: [], conflicts: [], moves: [{ axis: "x", parameter: "run_current" }] });
  expect(text.replace(/run_ma = \d+/, "run_ma = 1900")).toBe(TEXT);
});

test("takes another weight and the leave to raise a current from the policy that is sent", async () => {
  const { versions } = await counterPropose(viewer, {
    ...request(TEXT),
    policy: { counter_raises_current: true, counter_weight_current: 5 },
  });
  expect(versions.policy).toMatch(/\+sent$/);
});

test("stores nothing", async () => {
  const before = await FileContent.count();
  await counterPropose(viewer, request(TEXT));
  expect(await FileContent.count()).toBe(before);
});

test("is refused to a token without the scope", async () => {
  const [id, ownerId] = [crypto.randomUUID(), crypto.randomUUID()];
  const reader: Context = {
    ...viewer,
    actor: { kind: "token", id, name: "a reader", role: "viewer", scopes: ["read"], ownerId },
  };
  await expect(counterPropose(reader, request(TEXT))).rejects.toMatchObject({ code: "forbidden" });
});
