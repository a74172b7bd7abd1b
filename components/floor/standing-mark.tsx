import type { Standing } from "@/lib/domain/floor";
import { LevelMark } from "@/components/ui/level-mark";

/** The mark of a machine's standing; none for a machine on baseline or out of service, whose sentence says it. */
export function StandingMark({ standing }: { readonly standing: Standing }) {
  if (standing === "on_baseline" || standing === "out_of_service") return null;
  return <LevelMark level={standing} word={false} />;
}
