import type { Assembly } from "@/lib/domain/assembly";
import { axisKind, type AxisKind } from "@/lib/domain/axis-kind";

/** Kind by axis name in lower case. */
export type Kinds = Readonly<Record<string, AxisKind>>;

/** The kinds of a machine's axes, for the words of their parameters. */
export function kindsOf({ axes }: Assembly): Kinds {
  return Object.fromEntries(
    axes.map(({ axis, drive_train: driveTrain }) => [axis.toLowerCase(), axisKind(driveTrain?.kind)]),
  );
}
