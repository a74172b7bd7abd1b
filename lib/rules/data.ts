import type { Driver, DriveTrain, Load, Motor, Mount, SetPoint } from "@/lib/domain/assembly";
import type { ParameterName } from "@/lib/domain/parameters";
import { parameterDefinition } from "@/lib/domain/parameters";
import { formatNumber } from "@/lib/domain/units";
import type { ParameterValue } from "@/lib/domain/values";
import { connectionFactors } from "@/lib/physics/current-conventions";
import type { AxisView, Computed, Datum, Known, Missing } from "./types";

interface Parts {
  motor: Motor;
  driver: Driver;
  drive_train: DriveTrain;
  load: Load;
  mount: Mount;
}

/** Names of the fields of T that hold numbers. */
type NumberField<T> = { [K in keyof T]-?: number extends T[K] ? K : never }[keyof T] & string;

const NONE: readonly string[] = [];

export function missing(...needs: readonly string[]): Missing {
  return { ok: false, needs, reason: "" };
}

export function unusable(reason: string, ...needs: readonly string[]): Missing {
  return { ok: false, needs, reason, refused: needs };
}

/** A number too large to reckon with is as good as missing. */
export const OUT_OF_RANGE = unusable("The numbers are out of the range that can be reckoned with.");

export function given(value: number, assumed = NONE): Known {
  return { ok: true, value, assumed };
}

/** A computed value with its formula. */
export function computed(value: number, assumed: readonly string[], formula: () => string): Computed {
  if (!Number.isFinite(value)) return OUT_OF_RANGE;
  return { ok: true, value, assumed, formula };
}

function datum(value: unknown, path: string): Datum {
  return typeof value === "number" ? given(value) : missing(path);
}

export function axisPath(axis: AxisView, field: string): string {
  return `axes.${axis.axis}.${field}`;
}

/** A number of a part of the axis, in the unit of its name. */
export function hardware<P extends keyof Parts>(
  axis: AxisView,
  part: P,
  field: NumberField<Parts[P]>,
): Datum {
  const fields: Readonly<Record<string, unknown>> | undefined = axis.hardware[part];
  const value = fields?.[field];
  if (typeof value !== "number") return missing(axisPath(axis, `${part}.${field}`));
  if (part !== "motor" || axis.hardware.motor?.rating_of !== "half_coil") return given(value);
  return asConnected(axis, field, value);
}

const AS_CONNECTED: Readonly<Record<string, keyof ReturnType<typeof connectionFactors>>> = {
  rated_current_a: "current",
  resistance_ohm: "resistance",
  inductance_mh: "inductance",
};

/** A datum of a half coil as it counts for the winding that the coils are connected to. */
function asConnected(axis: AxisView, field: string, value: number): Datum {
  const factor = AS_CONNECTED[field];
  if (factor === undefined) return given(value);
  const connection = axis.hardware.motor?.connection;
  if (connection === undefined) return missing(axisPath(axis, "motor.connection"));
  return given(value * connectionFactors(connection)[factor]);
}

/** A number of the driver's set-point, in the unit of its name. */
export function setPoint(axis: AxisView, field: NumberField<SetPoint>): Datum {
  const value = axis.hardware.driver?.set_point?.[field];
  return typeof value === "number" ? given(value) : missing(axisPath(axis, `driver.set_point.${field}`));
}

/** What stands in for a datum that most data sheets leave out; named where a finding rests on it. */
export function orDefault(found: Datum, fallback: number): Known {
  return found.ok ? found : given(fallback, found.needs);
}

/** Number of motors of the axis, each with its own driver at the run current. */
export function motorCount(axis: AxisView): Known {
  return orDefault(datum(axis.hardware.motor_count, axisPath(axis, "motor_count")), 1);
}

/** Supply voltage, V. What the text says of it does not count: the supply is hardware. */
export function supplyVoltage(axis: AxisView): Datum {
  return datum(axis.assembly.supply?.voltage_v, "supply.voltage_v");
}

/** Tolerance of the supply voltage, share of 1. */
export function supplyTolerance(axis: AxisView): Known {
  return orDefault(datum(axis.assembly.supply?.tolerance, "supply.tolerance"), 0.05);
}

/** Air around the driver, °C. */
export function driverAmbient(axis: AxisView): Datum {
  const { ambient_c, enclosure_rise_k } = axis.assembly;
  const parts = gather({
    ambient: datum(ambient_c, "ambient_c"),
    rise: orDefault(datum(enclosure_rise_k, "enclosure_rise_k"), 0),
  });
  if (!parts.ok) return parts;
  return given(parts.values.ambient + parts.values.rise, parts.assumed);
}

/** Air around the motor, °C. */
export function motorAmbient(axis: AxisView): Datum {
  const { ambient_c, motor_ambient_c } = axis.assembly;
  return datum(motor_ambient_c ?? ambient_c, "ambient_c");
}

/**
 * A parameter that the text must have, SI; where it must be `positive` or `not-negative` another sign is unusable, and so
 * is a fraction where only whole numbers have a meaning: no driver divides a step into 16.5 microsteps.
 */
export function fromText(
  axis: AxisView,
  name: ParameterName,
  sign: "positive" | "not-negative" = "not-negative",
): Datum {
  const found = axis.parameter(name);
  if (!found) return missing(axisPath(axis, name));
  if (found.value < 0 || (sign === "positive" && found.value === 0)) return senseless(axis, found, sign);
  if (name === "microsteps" && !Number.isInteger(found.value)) return senseless(axis, found, "whole");
  return given(found.value);
}

const WANTED = { positive: "more than 0", "not-negative": "0 or more", whole: "a whole number" } as const;

/** A parameter whose number makes no sense, in the words of the text. */
export function senseless(axis: AxisView, found: ParameterValue, wanted: keyof typeof WANTED): Missing {
  const { label } = parameterDefinition(found.parameter);
  const typed = `${formatNumber(found.typed.value, 6)} ${found.typed.unit ?? ""}`.trim();
  return unusable(
    `${label} is ${typed} in the text; it must be ${WANTED[wanted]}.`,
    axisPath(axis, found.parameter),
  );
}

type Values<T> = { readonly [K in keyof T]: number };
export type Gathered<T> =
  | {
      readonly ok: true;
      readonly values: Values<T>;
      readonly assumed: readonly string[];
      /** Formula of one of the data, its numbers put in; empty for a plain number. */
      readonly formula: (name: keyof T) => string;
    }
  | Missing;

/** All the data together, or everything that is missing of them. */
export function gather<T extends Readonly<Record<string, Datum>>>(data: T): Gathered<T> {
  const values: Record<string, number> = {};
  let assumed = NONE;
  let lack: Missing | null = null;
  for (const name in data) {
    const found = data[name];
    if (!found) continue;
    if (found.ok) {
      values[name] = found.value;
      if (found.assumed.length > 0)
        assumed = assumed === NONE ? found.assumed : merged(assumed, found.assumed);
    } else lack = lack ? bothMissing(lack, found) : found;
  }
  return lack ?? { ok: true, values: complete<T>(values), assumed, formula: (name) => formulaOf(data[name]) };
}

function formulaOf(found: Datum | Computed | undefined): string {
  return found?.ok === true && "formula" in found ? found.formula() : "";
}

/** Safe: `gather` has put in a number for each key of T, or returned what is missing. */
function complete<T>(values: Record<string, number>): Values<T> {
  return values as Values<T>;
}

/** What two attempts lack together. */
export function bothMissing(one: Missing, other: Missing): Missing {
  return {
    ok: false,
    needs: merged(one.needs, other.needs),
    reason: [...new Set([one.reason, other.reason])].filter((reason) => reason !== "").join(" "),
    refused: merged(one.refused ?? NONE, other.refused ?? NONE),
    runaway: one.runaway === true || other.runaway === true,
  };
}

export function merged(one: readonly string[], other: readonly string[]): readonly string[] {
  return [...new Set([...one, ...other])];
}
