import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { CATALOG_SPREAD, fitThermalResistance, riseUncertainty } from "@/lib/physics/thermal-fit";

const at = (resistance: number, ...powers: readonly number[]) =>
  powers.map((power) => ({ power, rise: resistance * power }));

function fitted(catalog: number, readings: ReturnType<typeof at>) {
  const fit = fitThermalResistance(catalog, readings);
  if (!fit.ok) throw new Error(fit.because);
  return fit;
}

describe("a thermal resistance from settled temperatures", () => {
  test("is the minimum of the weighted squares, found by scanning", () => {
    const readings = [
      { power: 3, rise: 27 },
      { power: 4, rise: 41 },
      { power: 5, rise: 46 },
    ];
    const squares = (value: number) =>
      ((value - 8.5) / (CATALOG_SPREAD * 8.5)) ** 2 +
      readings.reduce(
        (sum, { power, rise }) => sum + ((rise - value * power) / riseUncertainty(rise)) ** 2,
        0,
      );
    let best = 5;
    for (let value = 5; value < 15; value += 1e-4) if (squares(value) < squares(best)) best = value;
    const { value, uncertainty } = fitted(8.5, readings);
    expect(value).toBeCloseTo(best, 3);
    // The curvature of the squares gives the uncertainty: half a unit of χ² apart at one u.
    expect(squares(value + uncertainty) - squares(value)).toBeCloseTo(1, 6);
  });

  test("stays at the catalog value where the readings agree with it, and is surer of it", () => {
    const { value, uncertainty, low, high } = fitted(8.5, at(8.5, 3, 4));
    expect(value).toBeCloseTo(8.5, 12);
    expect(uncertainty).toBeLessThan(CATALOG_SPREAD * 8.5 * 0.25);
    expect(low).toBeLessThan(8.5);
    expect(high).toBeGreaterThan(8.5);
  });

  test("lies between catalog and readings, the nearer to the readings the more there are", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 30, noNaN: true }),
        fc.double({ min: 0.7, max: 1.5, noNaN: true }),
        fc.double({ min: 4, max: 20, noNaN: true }),
        (catalog, factor, power) => {
          const true_ = catalog * factor;
          fc.pre(true_ * power >= 10);
          const few = fitThermalResistance(catalog, at(true_, power, power));
          const many = fitThermalResistance(catalog, at(true_, power, power, power, power, power));
          if (!few.ok || !many.ok) throw new Error("refused");
          const [low, high] = [Math.min(catalog, true_) - 1e-9, Math.max(catalog, true_) + 1e-9];
          expect(few.value).toBeGreaterThanOrEqual(low);
          expect(few.value).toBeLessThanOrEqual(high);
          expect(Math.abs(many.value - true_)).toBeLessThanOrEqual(Math.abs(few.value - true_) + 1e-9);
          expect(many.weight).toBeGreaterThan(few.weight);
        },
      ),
    );
  });

  test("is refused for one reading and for readings hardly warmer than the air", () => {
    expect(fitThermalResistance(8.5, at(8.5, 4))).toEqual({ ok: false, because: "too_few" });
    expect(fitThermalResistance(8.5, at(8.5, 4, 1, 1))).toEqual({ ok: false, because: "too_few" });
  });

  test("is refused where the readings cannot all be true", () => {
    const readings = [...at(4, 5), ...at(16, 5)];
    expect(fitThermalResistance(8.5, readings)).toEqual({ ok: false, because: "contradictory" });
  });

  test("is refused where it would lead more than two deviations away from the catalog", () => {
    // By hand: on half the current the loss is a quarter of what is reckoned, so readings say 0.25·8.5 K/W: 75 % below the
    // catalog, where two deviations are 60 %.
    const onHold = at(0.25 * 8.5, 8, 8, 8);
    expect(fitThermalResistance(8.5, onHold)).toEqual({ ok: false, because: "far_from_catalog" });
    expect(fitThermalResistance(8.5, at(1.75 * 8.5, 8, 8))).toEqual({
      ok: false,
      because: "far_from_catalog",
    });
    expect(fitThermalResistance(8.5, at(0.45 * 8.5, 8, 8)).ok).toBe(true);
    expect(fitThermalResistance(8.5, at(1.55 * 8.5, 8, 8)).ok).toBe(true);
  });

  test("has a wider interval where readings scatter more than they should", () => {
    const calm = fitted(8.5, at(9, 5, 5));
    const wild = fitted(8.5, [...at(7.8, 5), ...at(10.2, 5)]);
    expect(wild.high - wild.low).toBeGreaterThan(calm.high - calm.low);
  });
});
