import Link from "next/link";
import { parameterLabel } from "@/lib/domain/parameters";
import type { ChangeView } from "./change-view";

/** Permitted deviations in force that hold a parameter which the change moves: they stay, on top of it. */
export function DeviationsTouched({ touched }: { readonly touched: ChangeView["deviationsTouched"] }) {
  if (touched.length === 0) return null;
  return (
    <>
      <h3>Permitted deviations that it touches</h3>
      <ul className="machine-notes">
        {touched.map(({ machineId, serial, changeLabel, axis, parameter, until }) => (
          <li key={`${machineId}${axis ?? ""}${parameter}`}>
            <Link href={`/machines/${machineId}`}>{serial}</Link> keeps its own{" "}
            {axis === null ? "" : `${axis.toUpperCase()} `}
            {parameterLabel(parameter).toLowerCase()} until {until} ({changeLabel}).
          </li>
        ))}
      </ul>
    </>
  );
}
