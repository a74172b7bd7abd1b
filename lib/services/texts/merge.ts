import "server-only";
import { mergeConfigurations } from "@/lib/review/merge";
import type { ConflictPlace, MergeConflict } from "@/lib/review/merge-types";
import type { MergeAnswer, MergeTexts } from "@/lib/schemas/texts";
import { mergeTextsSchema } from "@/lib/schemas/texts";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { acceptFiles } from "@/lib/services/revisions/accept";
import { answerFile } from "./answer";
import { mergedFiles } from "./merged-files";

/** Merges sent texts without keeping anything. */
export async function mergeTexts(context: Context, input: MergeTexts): Promise<MergeAnswer> {
  authorize(context, "check.run");
  const request = mergeTextsSchema.parse(input);
  const sides = {
    base: acceptFiles(request.base, request.format, "base"),
    ours: acceptFiles(request.ours, request.format, "ours"),
    theirs: acceptFiles(request.theirs, request.format, "theirs"),
  };
  const { files, conflicts } = mergeConfigurations({
    ...sides,
    keyTable: request.keyTable,
    assembly: { axes: [] },
    choices: new Map(Object.entries(request.choices)),
  });
  const sent = [...request.ours, ...request.theirs, ...request.base];
  return {
    files: files && mergedFiles(files, sides).map((file) => answerFile(file, sent)),
    conflicts: conflicts.filter(({ choice }) => choice === null).flatMap(rowsOf),
  };
}

/** One row a parameter or key; one for lines without either. */
function rowsOf({ id, kind, path, places, lines, options }: MergeConflict): MergeAnswer["conflicts"] {
  const said = (side: "base" | "ours" | "theirs") => {
    const found = lines[side];
    return found && { value: null, unit: null, basis: null, raw: found.text, path, line: found.line };
  };
  const bare: ConflictPlace = {
    axis: null,
    parameter: null,
    key: null,
    base: said("base"),
    ours: said("ours"),
    theirs: said("theirs"),
  };
  return (places.length > 0 ? places : [bare]).map((place) => ({
    id,
    kind,
    ...place,
    options: [...options],
  }));
}
