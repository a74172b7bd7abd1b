import type { FloorColumn, FloorRow } from "@/lib/domain/floor";

export type { FloorCell, FloorColumn, FloorRow, Standing } from "@/lib/domain/floor";

/** What the map and its parts draw. Rows come in the order they are shown, columns of one axis together. */
export interface FloorData {
  readonly columns: readonly FloorColumn[];
  readonly rows: readonly FloorRow[];
}
