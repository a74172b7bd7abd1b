import { ButtonLink } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";

export interface StaleNoticeProps {
  readonly changeId: string;
  /** Why the proposal cannot be decided as it stands; null once it stands on the text in force. */
  readonly stale: string | null;
  readonly mayEdit: boolean;
}

/** Says that the base has moved, and leads to where the proposal is merged with the text in force. */
export function StaleNotice({ changeId, stale, mayEdit }: StaleNoticeProps) {
  if (stale === null) return null;
  return (
    <Notice
      title="The base has moved"
      acts={
        mayEdit && (
          <ButtonLink variant="primary" href={`/changes/${changeId}/merge`}>
            Bring it up to date
          </ButtonLink>
        )
      }
    >
      <p>{stale}</p>
    </Notice>
  );
}
