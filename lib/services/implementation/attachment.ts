import "server-only";
import { Attachment } from "@/models/implementation";
import { FileContent } from "@/models/revisions";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";

/** A file attached to a verification, byte for byte. */
export async function attachmentFile(context: Context, id: string): Promise<{ name: string; bytes: Buffer }> {
  authorize(context, "changes.read");
  const attachment = await Attachment.findByPk(id);
  const content = attachment && (await FileContent.findByPk(attachment.sha256));
  if (!attachment || !content) throw notFound("attachment");
  return { name: attachment.name, bytes: content.bytes };
}
