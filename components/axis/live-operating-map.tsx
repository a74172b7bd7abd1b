"use client";

import { useMemo } from "react";
import { SheetSection } from "@/components/ui/sheet";
import type { Texts } from "@/lib/review/axis-pictures";
import type { ConfigurationFile } from "@/lib/review/types";
import { MapsOfChange } from "./maps-of-change";
import { usePictures } from "./use-pictures";

export interface LiveOperatingMapProps extends Texts {
  /** The text that the change starts from; empty where there is none. */
  readonly base: readonly ConfigurationFile[];
}

/** A file stays in the format that it had: recognising it anew at each key would take longer than the map itself. */
function asBase(
  files: readonly ConfigurationFile[],
  base: readonly ConfigurationFile[],
): readonly ConfigurationFile[] {
  const formats = new Map(base.map(({ path, format }) => [path, format]));
  return files.map((file) => ({ ...file, format: file.format ?? formats.get(file.path) }));
}

/** The operating maps that the text moves, redrawn while it is typed. */
export function LiveOperatingMap({ base, files, keyTable, assembly, policy }: LiveOperatingMapProps) {
  const question = useMemo(
    () => ({
      kind: "change" as const,
      base,
      texts: { files: asBase(files, base), keyTable, assembly, policy },
    }),
    [base, files, keyTable, assembly, policy],
  );
  const answer = usePictures(question);
  if (!answer || answer.maps.length === 0) return null;
  return (
    <SheetSection title="Operating map" note="of the axes that the text moves on it">
      <MapsOfChange maps={answer.maps} />
    </SheetSection>
  );
}
