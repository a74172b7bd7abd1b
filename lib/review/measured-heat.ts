import type { MeasuredTemperature } from "@/lib/domain/changes";
import type { RefinableField } from "@/lib/domain/refined";
import { windingPower, windingSteadyState } from "@/lib/physics/motor-heat";
import { fitThermalResistance, isUsable, LEAST_RISE, type ThermalFit } from "@/lib/physics/thermal-fit";
import type { HeatModel } from "@/lib/rules/heat-model";

/** A temperature measured at a verification, with what bore on it then. */
export interface MeasuredHeat extends MeasuredTemperature {
  readonly verificationId: string;
  /** ISO 8601 */
  readonly at: string;
  /** Air around the motor, °C; null where nobody measured it. */
  readonly ambientC: number | null;
  /** A rms in one winding by what the machine was required to run then; null where it cannot be known. */
  readonly current: number | null;
  /** The motor and its mount are the same as today. */
  readonly sameMotor: boolean;
}

/** The motor of one axis; `stated` are the fields recorded on this very machine, which nothing refines. */
export interface MeasuredMotor extends HeatModel {
  readonly stated: readonly RefinableField[];
}

export interface JudgedHeat extends MeasuredHeat {
  /** Copper loss then, W, and the rise above the air, K; null where they cannot be known. */
  readonly power: number | null;
  readonly rise: number | null;
  /** °C by the catalog's thermal resistance. */
  readonly predicted: number | null;
  /** Why it does not refine anything; null where it does. */
  readonly ignored: string | null;
}

export interface AxisFit {
  readonly axis: string;
  readonly field: RefinableField;
  /** K/W */
  readonly catalog: number;
  /** Temperatures that the fit rests on, or would rest on. */
  readonly readings: number;
  readonly fit: ThermalFit;
}

export interface HeatReport {
  readonly readings: readonly JudgedHeat[];
  readonly fits: readonly AxisFit[];
}

/** Where each temperature is measured, and which thermal resistance it says something of. */
const FIELD_OF = {
  winding: ["winding_to_ambient_k_per_w", "windingResistance"],
  case: ["case_to_ambient_k_per_w", "caseResistance"],
} as const satisfies Partial<
  Record<MeasuredTemperature["place"], readonly [RefinableField, keyof HeatModel]>
>;
type Place = keyof typeof FIELD_OF;
const PLACES: readonly Place[] = ["winding", "case"];

/**
 * Temperatures measured on one machine against what the catalog predicts, and the thermal resistance of each axis that
 * they refine. `models` hold the axes of today with the catalog's values. Each temperature is taken as settled, on run
 * current at standstill; the loss is reckoned at the measured winding temperature, for a case at the winding measured
 * beside it, else at the one predicted.
 */
export function measuredHeat(
  measured: readonly MeasuredHeat[],
  models: readonly MeasuredMotor[],
): HeatReport {
  const readings = measured.map((one) => judge(one, measured, models));
  const fits = models.flatMap((model) => PLACES.flatMap((place) => fitOf({ model, place, readings })));
  return { readings, fits };
}

interface Sought {
  readonly model: MeasuredMotor;
  readonly place: Place;
  readonly readings: readonly JudgedHeat[];
}

function fitOf({ model, place, readings }: Sought): AxisFit[] {
  const [field, name] = FIELD_OF[place];
  const catalog = model[name];
  if (catalog === null || model.stated.includes(field)) return [];
  const used = readings.flatMap((one) =>
    one.ignored === null &&
    one.place === place &&
    isAxis(one, model) &&
    one.power !== null &&
    one.rise !== null
      ? [{ power: one.power, rise: one.rise }]
      : [],
  );
  if (used.length === 0) return [];
  const fit = fitThermalResistance(catalog, used);
  return [{ axis: model.axis, field, catalog, readings: used.length, fit }];
}

function isAxis({ axis }: MeasuredHeat, model: HeatModel): boolean {
  return axis?.toLowerCase() === model.axis.toLowerCase();
}

function judge(
  one: MeasuredHeat,
  all: readonly MeasuredHeat[],
  models: readonly MeasuredMotor[],
): JudgedHeat {
  const ignored = (reason: string): JudgedHeat => ({
    ...one,
    power: null,
    rise: null,
    predicted: null,
    ignored: reason,
  });
  const model = models.find((known) => isAxis(one, known));
  if (one.place !== "winding" && one.place !== "case")
    return ignored("Kept for the record; only the motor's winding and case refine its thermal data.");
  if (!model) return ignored("It belongs to no axis whose motor heat can be reckoned.");
  if (!one.sameMotor) return ignored("The motor or its mount was another one then.");
  if (one.ambientC === null) return ignored("The ambient temperature was not measured beside it.");
  if (one.current === null) return ignored("The winding current of that time cannot be known.");
  return reckon(one, { model, all, ambient: one.ambientC, current: one.current });
}

interface Ground {
  readonly model: MeasuredMotor;
  readonly all: readonly MeasuredHeat[];
  readonly ambient: number;
  readonly current: number;
}

function reckon(one: MeasuredHeat, ground: Ground): JudgedHeat {
  const { model, ambient, current } = ground;
  const settled =
    model.windingResistance === null
      ? null
      : windingSteadyState({
          current,
          resistanceAt20: model.resistanceAt20,
          thermalResistance: model.windingResistance,
          ambient,
        });
  const winding =
    one.place === "winding" ? one.celsius : (windingBeside(one, ground) ?? settled?.temperature);
  const rise = one.celsius - ambient;
  if (winding === undefined)
    return {
      ...one,
      power: null,
      rise,
      predicted: null,
      ignored: "The winding temperature beside it is not known, nor its thermal resistance to ambient.",
    };
  const power = windingPower({ current, resistanceAt20: model.resistanceAt20, temperature: winding });
  const predicted =
    one.place === "winding"
      ? (settled?.temperature ?? null)
      : model.caseResistance === null || !settled
        ? null
        : ambient + model.caseResistance * settled.power;
  const cold = isUsable({ power, rise })
    ? null
    : `Less than ${LEAST_RISE} K above the air: too little to say anything.`;
  return { ...one, power, rise, predicted, ignored: cold };
}

/** The winding of the same axis measured at the same verification, °C. */
function windingBeside(one: MeasuredHeat, { all, model }: Ground): number | undefined {
  return all.find(
    (other) =>
      other.verificationId === one.verificationId && other.place === "winding" && isAxis(other, model),
  )?.celsius;
}
