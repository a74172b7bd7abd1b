import { LevelMark } from "@/components/ui/level-mark";

/** What stands in the place of a picture that lacks data: which ones. */
export function NoPicture({ sentence }: { readonly sentence: string }) {
  return (
    <p>
      <LevelMark level="cannot" /> {sentence}
    </p>
  );
}
