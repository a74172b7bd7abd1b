/** Belt, screw and rack axes are linear (m, m/s, 1/mm); a rotary axis is measured in rad, rad/s, 1/deg. */
export type AxisKind = "linear" | "rotary";

export function axisKind(driveTrainKind: string | undefined): AxisKind {
  return driveTrainKind === "rotary" ? "rotary" : "linear";
}
