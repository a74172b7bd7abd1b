import { plural } from "@/lib/domain/sentences";

/** Folds lines away in which only spacing or a comment differs; works without script. Nothing where there are none. */
export function FoldQuiet({ count }: { readonly count: number }) {
  if (count === 0) return null;
  return (
    <label className="fold-quiet">
      <input type="checkbox" />
      fold {plural(count, "line")} where only spacing or a comment differs
    </label>
  );
}
