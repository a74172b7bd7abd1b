"use client";

import { useMedia } from "./browser-state";
import { FloorGrid } from "./floor-grid";
import { FloorLegend } from "./legend";
import { FloorList } from "./floor-list";
import type { FloorData } from "./types";

export interface FloorMapProps extends FloorData {
  /** Address of a machine without its id. */
  readonly machineBase?: string | undefined;
}

/** Every machine against its required configuration: a map on a desk, a list on a phone. */
export function FloorMap({ columns, rows, machineBase = "/machines" }: FloorMapProps) {
  const narrow = useMedia("screen and (max-width: 699px)");
  if (narrow) return <FloorList columns={columns} rows={rows} machineBase={machineBase} />;
  return (
    <div className="floor">
      <FloorLegend />
      <FloorGrid columns={columns} rows={rows} machineBase={machineBase} />
    </div>
  );
}
