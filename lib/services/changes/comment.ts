import "server-only";
import type { z } from "zod";
import type { commentSchema } from "@/lib/schemas/changes";
import { Comment } from "@/models/changes";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { lockChange, recordObject } from "./load";

interface Request {
  readonly id: string;
  readonly comment: z.output<typeof commentSchema>;
}

/** Hangs a comment on the change, a parameter or a line of one proposal version. */
export async function commentOnChange(context: Context, { id, comment }: Request): Promise<{ id: string }> {
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, id, null);
    authorize(tx, "changes.comment");
    if (comment.proposalVersion > change.currentVersion)
      throw new ServiceError("invalid", "There is no such proposal version.", {
        pointer: "/proposalVersion",
      });
    const row = await Comment.create(
      {
        changeId: change.id,
        proposalVersion: comment.proposalVersion,
        anchor: comment.anchor,
        body: comment.body,
        authorId: tx.actor.id,
        authorName: tx.actor.name,
        createdAt: tx.now,
      },
      { transaction: tx.transaction },
    );
    await appendRecord(tx, {
      action: "change.commented",
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      after: { comment: row.id, anchor: comment.anchor, body: comment.body },
    });
    return { id: row.id };
  });
}
