import { format } from "prettier";
import { afterAll, describe, expect, it } from "vitest";
import { peakFromRms } from "@/lib/physics/current-conventions";
import { conservativePullOut, voltageConstant } from "@/lib/physics/pull-out";
import { ROWS } from "./rows";
import { comparisons, publishedSummary } from "./summary";

const SIMULATED = ROWS.filter(({ calc }) => calc === "pullout");

describe("published values", () => {
  it.each(ROWS.map(({ id, topic, confirmed, source }) => [id, topic, confirmed, source]))(
    "%s (%s, %s): %s",
    (id) => {
      const row = ROWS.find((one) => one.id === id)!;
      for (const { name, expected, computed, allowed } of comparisons(row)) {
        if (typeof expected === "boolean") expect(computed, name).toBe(expected);
        else
          expect(
            Math.abs(Number(computed) - expected),
            `${name}: ${String(computed)} against ${expected}`,
          ).toBeLessThanOrEqual(allowed);
      }
    },
  );

  it("are each named once", () => {
    expect(new Set(ROWS.map(({ id }) => id)).size).toBe(ROWS.length);
  });

  // Written anew by `npx vitest run --project unit tests/published -u` where a row or a formula has changed.
  it("stand on the page of the checks as they are computed here", async () => {
    const text = await format(JSON.stringify(publishedSummary()), { parser: "json", printWidth: 110 });
    await expect(text).toMatchFileSnapshot("../../components/checks/published-values.json");
  });
});

describe("pull-out beside a simulation of the phase equations", () => {
  // Source: independent time-domain simulation of the two phases (derived); the conservative form lies below it.
  it.each(SIMULATED.map(({ id }) => id))("%s: conservative by 0 to 26 %%", (id) => {
    const row = SIMULATED.find((one) => one.id === id)!;
    const input = (name: string) => Number(row.inputs[name]);
    const torque = conservativePullOut(
      {
        voltage: input("v_v"),
        resistance: input("r_ohm"),
        inductance: input("l_h"),
        voltageConstant: voltageConstant(input("th_nm"), input("i_rated_a")),
        rotorTeeth: input("nr"),
        peakCurrent: peakFromRms(input("i_rms_a")),
      },
      (input("speed_rpm") * 2 * Math.PI) / 60,
    );
    const share = torque / Number(row.expected.t_expected_nm);
    expect(share).toBeLessThanOrEqual(1);
    expect(share).toBeGreaterThanOrEqual(0.74);
  });
});

afterAll(() => {
  const { topics, notUsed } = publishedSummary();
  const lines = topics.map(
    ({ topic, rows, values, largestDeviation }) =>
      `${topic.padEnd(24)} ${String(rows).padStart(3)} rows ${String(values).padStart(3)} values, largest deviation ${largestDeviation}`,
  );
  const unused = notUsed.map(({ value, source, reason }) => `  ${value} (${source}): ${reason}`);
  console.log(["Published values against lib/physics:", ...lines, "Not used:", ...unused].join("\n"));
});
