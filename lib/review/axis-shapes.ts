import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import { axisKind } from "@/lib/domain/axis-kind";
import type { AxisShape } from "@/lib/keytable/types";
import { fullStepsPerTurn, travelPerMotorTurn } from "@/lib/physics/drive-train";

/** What the key table needs of each axis, in the assembly's order: travel in m (or rad) for one motor turn, full steps of a turn. */
export function axisShapes(assembly: Assembly): AxisShape[] {
  return assembly.axes.map(axisShape);
}

function axisShape({ axis, drive_train: driveTrain, motor }: AxisAssembly): AxisShape {
  const travelPerTurn = driveTrain ? travelPerMotorTurn(driveTrain) : null;
  const stepAngle = motor?.step_angle_deg;
  return {
    axis,
    kind: axisKind(driveTrain?.kind),
    ...(travelPerTurn === null ? {} : { travelPerTurn }),
    ...(stepAngle === undefined ? {} : { fullStepsPerTurn: fullStepsPerTurn(stepAngle) }),
  };
}
