export type { FloorCell, FloorColumn, FloorRow, Standing } from "@/lib/domain/floor";
