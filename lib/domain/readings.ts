import { z } from "zod";

export const READING_KINDS = ["as_found", "as_left", "in_service"] as const;
export const readingKindSchema = z.enum(READING_KINDS);
export type ReadingKind = z.infer<typeof readingKindSchema>;
export const READING_KIND_WORDS: Record<ReadingKind, string> = {
  as_found: "as-found",
  as_left: "as-left",
  in_service: "in service",
};

/** Lowest first: a stored value beats the file's, a running one beats both. */
export const LAYERS = ["file", "stored", "running"] as const;
export const layerSchema = z.enum(LAYERS);
export type Layer = z.infer<typeof layerSchema>;
export const LAYER_WORDS: Record<Layer, string> = {
  file: "file",
  stored: "stored values",
  running: "running values",
};

export function layerRank(layer: Layer): number {
  return LAYERS.indexOf(layer);
}
