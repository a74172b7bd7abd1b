import "server-only";
import { Op } from "sequelize";
import type { Decision } from "@/lib/domain/changes";
import { changeLabel } from "@/lib/domain/changes";
import { CHANGE_CLASS_WORDS } from "@/lib/domain/change-states";
import { joinWords, plural } from "@/lib/domain/sentences";
import { env } from "@/lib/server/env";
import type { ChangeRequest, Disposition } from "@/models/changes";
import { Comment } from "@/models/changes";
import type { Machine } from "@/models/machines";
import { User } from "@/models/people";
import type { Tx } from "@/lib/services/kernel/context";
import { machinesOf, effectivityWords } from "@/lib/services/changes/effectivity";
import type { MailContent } from "./compose";
import { composeMail } from "./compose";
import { enqueueMail, wakeMailJob } from "./enqueue";
import { summaryLines } from "./summary";

function titleOf(change: ChangeRequest): string {
  return `${changeLabel(change.number)} ${change.title}`;
}

function linkTo(change: ChangeRequest, label: string): MailContent["link"] {
  return { label, url: `${env().publicUrl}/changes/${change.id}` };
}

interface Post {
  readonly change: ChangeRequest;
  readonly event: string;
  readonly to: readonly User[];
  readonly content: MailContent;
}

async function post(tx: Tx, { change, event, to, content }: Post): Promise<void> {
  const mail = composeMail(content);
  const key = `change:${change.id}:${event}:${change.lockVersion}`;
  for (const recipient of to) await enqueueMail(tx, { changeId: change.id, key, recipient, mail });
  if (to.length > 0) wakeMailJob(tx);
}

/** To everyone who can decide on it: approvers who neither wrote nor last edited it. */
export async function mailSubmission(tx: Tx, change: ChangeRequest): Promise<void> {
  const machines = await machinesOf({
    modelId: change.modelId,
    effectivity: change.effectivity,
    transaction: tx.transaction,
  });
  const approvers = await approversFor(tx, change);
  await post(tx, {
    change,
    event: "submitted",
    to: approvers,
    content: {
      subject: `${change.authorName} asks you to decide: ${titleOf(change)}`,
      lead: `${change.authorName} asks you to decide on ${titleOf(change)}.`,
      paragraphs: [
        change.reason,
        `It applies to ${effectivityWords(change.effectivity, machines)} and is of ${CHANGE_CLASS_WORDS[change.class]}.`,
      ],
      lines: await summaryLines(tx, change),
      link: linkTo(change, "Look at the change"),
    },
  });
}

const DECISION_WORDS: Record<Decision | "withdrawn", string> = {
  approved: "has approved",
  declined: "has declined",
  deferred: "has deferred",
  backed_out: "has backed out",
  withdrawn: "has withdrawn",
};

interface Told {
  readonly change: ChangeRequest;
  readonly decision: Decision | "withdrawn";
  readonly reason: string;
}

/** To the author and the distribution: last editor, those who commented, and the other approvers. */
export async function mailDisposition(tx: Tx, { change, decision, reason }: Told): Promise<void> {
  const told = `${tx.actor.name} ${DECISION_WORDS[decision]} ${titleOf(change)}.`;
  const next: Partial<Record<Told["decision"], string>> = {
    approved: "It can be released to its machines now.",
    deferred: "It can be taken up again at any time.",
    backed_out: "The machines require the text that they required before it.",
  };
  await post(tx, {
    change,
    event: decision,
    to: await distribution(tx, change),
    content: {
      subject: told.slice(0, -1),
      lead: told,
      paragraphs: [reason, next[decision] ?? ""].filter((words) => words !== ""),
      lines: await summaryLines(tx, change),
      link: linkTo(change, "Look at the change"),
    },
  });
}

/** To whoever signed: the signature no longer stands. */
export async function mailVoidedApproval(
  tx: Tx,
  { change, signature }: { change: ChangeRequest; signature: Disposition },
): Promise<void> {
  const signer = await User.findAll({
    where: { id: signature.actorId, active: true },
    transaction: tx.transaction,
  });
  await post(tx, {
    change,
    event: "approval_void",
    to: signer,
    content: {
      subject: `${tx.actor.name} edited ${titleOf(change)}: your approval is void`,
      lead: `${tx.actor.name} has edited ${titleOf(change)} after your approval, which is void now.`,
      paragraphs: ["The change is in evaluation again with a new proposal version."],
      lines: await summaryLines(tx, change),
      link: linkTo(change, "Look at the new version"),
    },
  });
}

interface Released {
  readonly change: ChangeRequest;
  readonly machines: readonly Machine[];
}

/** To the technicians of the sites whose machines it was released to, each with the machines of their site. */
export async function mailRelease(tx: Tx, { change, machines }: Released): Promise<void> {
  const siteIds = [...new Set(machines.map(({ siteId }) => siteId))];
  const technicians = await User.findAll({
    where: {
      role: "technician",
      active: true,
      siteId: { [Op.or]: [{ [Op.in]: siteIds }, { [Op.is]: null }] },
    },
    transaction: tx.transaction,
  });
  const lines = await summaryLines(tx, change);
  for (const technician of technicians) {
    const own = machines.filter(({ siteId }) => technician.siteId === null || siteId === technician.siteId);
    const serials = joinWords(own.slice(0, 20).map(({ serial }) => serial));
    const more = own.length > 20 ? `, and ${own.length - 20} more` : "";
    await post(tx, {
      change,
      event: "released",
      to: [technician],
      content: {
        subject: `${tx.actor.name} asks you to apply ${titleOf(change)} to ${plural(own.length, "machine")}`,
        lead: `${tx.actor.name} has released ${titleOf(change)}: please apply it to ${serials}${more}.`,
        paragraphs: [
          "For each machine: download its text, apply it, read it back and upload the as-left text, then record the test.",
          "Expect hot surfaces and unexpected motion; a raised load can fall when holding current is cut. Local rules and a competent person stand above this.",
        ],
        lines,
        link: { label: "Your steps", url: `${env().publicUrl}/work` },
      },
    });
  }
}

function approversFor(tx: Tx, change: ChangeRequest): Promise<User[]> {
  const own = [change.authorId, change.lastEditorId].filter((id) => id !== null);
  return User.findAll({
    where: { role: "approver", active: true, id: { [Op.notIn]: own } },
    transaction: tx.transaction,
  });
}

async function distribution(tx: Tx, change: ChangeRequest): Promise<User[]> {
  const comments = await Comment.findAll({ where: { changeId: change.id }, transaction: tx.transaction });
  const ids = [change.authorId, change.lastEditorId, ...comments.map(({ authorId }) => authorId)];
  const people = await User.findAll({
    where: { active: true, [Op.or]: [{ id: ids.filter((id) => id !== null) }, { role: "approver" }] },
    transaction: tx.transaction,
  });
  return people.filter(({ id }) => id !== tx.actor.id);
}
