import { axisTitle } from "@/components/findings/axis-title";
import type { OperatingMap } from "@/lib/review/operating-map";
import { OperatingMapPicture } from "./operating-map-picture";

/** One operating map for each axis that a change moves on it. */
export function MapsOfChange({ maps }: { readonly maps: readonly OperatingMap[] }) {
  return (
    <div className="maps-of-change">
      {maps.map((map) => (
        <section key={map.axis} aria-label={`Operating map of the ${axisTitle(map.axis)}`}>
          <h3>{axisTitle(map.axis)}</h3>
          <OperatingMapPicture map={map} />
        </section>
      ))}
    </div>
  );
}
