import { inertiaRatio, reflectedInertia } from "@/lib/physics/load-torque";
import { leastBeltStiffness, naturalFrequency } from "@/lib/physics/resonance";
import { axisPath, computed, gather, given, hardware, missing, motorCount, orDefault } from "../data";
import { plain, show } from "../show";
import type { AxisView, Computed, Datum } from "../types";
import type { QuantityDefinition } from "./definition";
import { GEOMETRY_READS, radius } from "./geometry";
import { INERTIA_READS, moved, MOVED_READS } from "./load";

export const INERTIA_RATIO: QuantityDefinition = {
  reads: [...INERTIA_READS, ...GEOMETRY_READS],
  from: [],
  compute: (axis) => {
    const parts = gather({
      rotor: hardware(axis, "motor", "rotor_inertia_gcm2"),
      driveTrain: orDefault(hardware(axis, "drive_train", "inertia_kgm2"), 0),
      moved: moved(axis),
      radius: radius(axis),
      motors: motorCount(axis),
    });
    if (!parts.ok) return parts;
    const { driveTrain, moved: mass, radius: r, motors } = parts.values;
    const rotor = parts.values.rotor * 1e-7;
    const load = driveTrain + reflectedInertia(mass, r) / motors;
    const ratio = inertiaRatio(load, rotor);
    return computed(
      ratio,
      parts.assumed,
      () => `${plain(load)} kg·m² / ${plain(rotor)} kg·m² = ${plain(ratio)}`,
    );
  },
};

export const STIFFNESS_READS = [
  "drive_train.kind",
  "drive_train.belt_stiffness_n_per_mm",
  "drive_train.belt_width_mm",
  "drive_train.belt_length_mm",
  "drive_train.axial_stiffness_n_per_um",
] as const;

/** Stiffness between motor and load along the axis, N/m; of a belt where it is softest. */
function stiffness(axis: AxisView): Datum {
  const kind = axis.hardware.drive_train?.kind;
  const axial = hardware(axis, "drive_train", "axial_stiffness_n_per_um");
  if (axial.ok) return given(axial.value * 1e6, axial.assumed);
  if (kind === undefined) return missing(axisPath(axis, "drive_train.kind"));
  if (kind !== "belt") return axial;
  const parts = gather({
    specific: hardware(axis, "drive_train", "belt_stiffness_n_per_mm"),
    width: hardware(axis, "drive_train", "belt_width_mm"),
    length: hardware(axis, "drive_train", "belt_length_mm"),
  });
  if (!parts.ok) return parts;
  const { specific, width, length } = parts.values;
  return given(leastBeltStiffness({ specific, width, length: length / 1000 }), parts.assumed);
}

const NO_LENGTH: Computed = {
  ok: false,
  needs: [],
  reason: "The stiffness of a rotary axis is not reckoned with.",
};

export const AXIS_RESONANCE: QuantityDefinition = {
  reads: [...STIFFNESS_READS, ...MOVED_READS],
  from: [],
  compute: (axis) => {
    if (axis.kind === "rotary") return NO_LENGTH;
    const parts = gather({ stiffness: stiffness(axis), mass: moved(axis) });
    if (!parts.ok) return parts;
    const { stiffness: k, mass } = parts.values;
    const frequency = naturalFrequency(k, mass);
    return computed(
      frequency,
      parts.assumed,
      () => `√(${plain(k)} N/m / ${show(mass, "kg")}) / 2π = ${show(frequency, "Hz")}`,
    );
  },
};
