import type { ChangeView } from "./change-view";
import { DateTime } from "@/components/ui/date-time";

type Comment = ChangeView["comments"][number];

/** Comments in the order they were made. */
export function Comments({ comments }: { readonly comments: readonly Comment[] }) {
  if (comments.length === 0) return null;
  return (
    <ul className="comments">
      {comments.map((comment) => (
        <li key={comment.id} id={`comment-${comment.id}`}>
          <p className="quiet">
            {comment.authorName}, <DateTime value={comment.createdAt} />, on version {comment.proposalVersion}
          </p>
          <p className="whitespace-pre-line">{comment.body}</p>
        </li>
      ))}
    </ul>
  );
}

/** Comments on one parameter. */
export function onParameter(
  comments: readonly Comment[],
  place: { readonly axis: string | null; readonly parameter: string },
): Comment[] {
  return comments.filter(
    ({ anchor }) =>
      anchor.kind === "parameter" &&
      anchor.parameter === place.parameter &&
      (anchor.axis ?? "") === (place.axis ?? ""),
  );
}

/** Comments on one line of one side of a file. */
export function onLine(
  comments: readonly Comment[],
  place: { readonly path: string; readonly side: "was" | "to_be"; readonly line: number },
): Comment[] {
  return comments.filter(
    ({ anchor }) =>
      anchor.kind === "line" &&
      anchor.path === place.path &&
      anchor.side === place.side &&
      anchor.line === place.line,
  );
}
