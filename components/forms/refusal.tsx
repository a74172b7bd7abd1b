import { sentenceOf } from "@/components/api";
import { Notice } from "@/components/ui/notice";

/** Why an act was refused; nothing while there is no refusal. */
export function Refusal({ error, title = "Not done" }: { readonly error: unknown; readonly title?: string }) {
  if (error === null || error === undefined) return null;
  return (
    <div className="my-4">
      <Notice title={title} live="alert">
        <p>{sentenceOf(error)}</p>
      </Notice>
    </div>
  );
}
