import { afterAll, describe, expect, it } from "vitest";
import { sequelize } from "@/lib/server/sequelize";
import { bringUpToDate } from "@/lib/services/changes/bring-up-to-date";
import { createChange } from "@/lib/services/changes/create";
import { decideChange } from "@/lib/services/changes/decide";
import { editChange } from "@/lib/services/changes/edit";
import { releaseChange } from "@/lib/services/changes/release";
import { showChange } from "@/lib/services/changes/show";
import { submitChange } from "@/lib/services/changes/submit";
import { takeBackChange } from "@/lib/services/changes/take-back";
import { withdrawChange } from "@/lib/services/changes/withdraw";
import { verifyChain } from "@/lib/services/record/verify-chain";
import { Baseline, ChangeRequest, Disposition } from "@/models/changes";
import { OutboxMail } from "@/models/outbox";
import { RecordEvent } from "@/models/record";
import { act, approvalOf, approve, draft, file, floor, signer, textOf } from "../../support/changes";

afterAll(() => sequelize.close());

const edit = (text: string) => ({ files: file(text), note: "" });

describe("four eyes", () => {
  it("lets neither the author nor the last editor decide, each with the reason", async () => {
    const world = await floor(1);
    const author = { ...world, engineer: world.approver };
    const change = await draft(author, textOf());
    await submitChange(world.approver, act(change.id));
    const request = await approvalOf(world, change.id, true);
    await expect(decideChange(world.approver, { id: change.id, request, ifMatch: null })).rejects.toThrow(
      "You wrote this change",
    );
    const second = await signer("approver");
    await editChange(second, { id: change.id, edit: edit(textOf({ accel: 2900 })), ifMatch: null });
    const again = await approvalOf(world, change.id, true);
    await expect(decideChange(second, { id: change.id, request: again, ifMatch: null })).rejects.toThrow(
      "edited this proposal last",
    );
  });

  it("counts whoever made a token as the author of what the token proposes", async () => {
    const world = await floor(1);
    const owner = world.approver.actor;
    const token = {
      actor: {
        kind: "token",
        id: owner.id,
        name: "pipeline",
        role: "engineer",
        scopes: ["propose"],
        ownerId: owner.id,
      },
      now: new Date(),
    } as const;
    const change = await createChange(token, {
      modelId: world.model.id,
      title: "From a script",
      reason: "The pipeline proposes it.",
      class: "II",
      note: "",
      files: file(textOf()),
    });
    await submitChange(token, act(change.id));
    const request = await approvalOf(world, change.id, true);
    await expect(decideChange(world.approver, { id: change.id, request, ifMatch: null })).rejects.toThrow(
      "You wrote this change",
    );
    await expect(decideChange(token, { id: change.id, request, ifMatch: null })).rejects.toMatchObject({
      code: "forbidden",
    });
  });
});

describe("a signature", () => {
  it("takes the right password, and a wrong one signs nothing", async () => {
    const world = await floor(1);
    const change = await draft(world, textOf());
    await submitChange(world.engineer, act(change.id));
    const request = { ...(await approvalOf(world, change.id, true)), password: "not the password" };
    await expect(
      decideChange(world.approver, { id: change.id, request, ifMatch: null }),
    ).rejects.toMatchObject({ pointer: "/password" });
    expect(await Disposition.count({ where: { changeId: change.id } })).toBe(0);
  });

  it("is bound to the proposal that was looked at", async () => {
    const world = await floor(1);
    const change = await draft(world, textOf());
    await submitChange(world.engineer, act(change.id));
    const request = await approvalOf(world, change.id, true);
    await editChange(world.engineer, { id: change.id, edit: edit(textOf({ current: 810 })), ifMatch: null });
    await expect(
      decideChange(world.approver, { id: change.id, request, ifMatch: null }),
    ).rejects.toMatchObject({ code: "precondition_failed" });
  });

  it("keeps its meaning, and is void after an edit with the baseline that it made", async () => {
    const world = await floor(1);
    const change = await draft(world, textOf());
    await approve(world, change.id);
    const [signed] = (await showChange(world.engineer, change.id)).dispositions;
    expect(signed?.meaning).toContain("I approve");
    expect(await Baseline.count({ where: { changeId: change.id, voidedAt: null } })).toBe(1);
    const edited = await editChange(world.engineer, {
      id: change.id,
      edit: edit(textOf({ current: 810 })),
      ifMatch: null,
    });
    expect(edited.state).toBe("evaluation");
    expect(await Baseline.count({ where: { changeId: change.id, voidedAt: null } })).toBe(0);
    const [after] = (await showChange(world.engineer, change.id)).dispositions;
    expect(after?.voidReason).toContain("after approval");
    await expect(releaseChange(world.engineer, act(change.id))).rejects.toMatchObject({ code: "conflict" });
    const told = await OutboxMail.findAll({ where: { changeId: change.id } });
    expect(told.some(({ subject }) => subject.includes("your approval is void"))).toBe(true);
  });

  it("over an over-limit finding takes a written justification of that finding", async () => {
    const world = await floor(1);
    const change = await draft(world, textOf({ current: 1700 }));
    await submitChange(world.engineer, act(change.id));
    const bare = await approvalOf(world, change.id);
    await expect(
      decideChange(world.approver, { id: change.id, request: bare, ifMatch: null }),
    ).rejects.toMatchObject({ pointer: "/justifications" });
    const request = await approvalOf(world, change.id, true);
    expect(Object.keys(request.justifications)).toContain("run-current-motor|x");
    const decided = await decideChange(world.approver, { id: change.id, request, ifMatch: null });
    expect(decided.state).toBe("approved");
  });

  it("belongs to the first of two who decide at the same moment; the other is told", async () => {
    const world = await floor(1);
    const second = await signer("approver");
    const change = await draft(world, textOf());
    await submitChange(world.engineer, act(change.id));
    const request = await approvalOf(world, change.id, true);
    const decline = { ...request, decision: "declined" as const, reason: "Not now." };
    const both = await Promise.allSettled([
      decideChange(world.approver, { id: change.id, request, ifMatch: null }),
      decideChange(second, { id: change.id, request: decline, ifMatch: null }),
    ]);
    const [lost] = both.filter((result) => result.status === "rejected");
    expect(both.filter(({ status }) => status === "fulfilled")).toHaveLength(1);
    expect(lost?.reason).toMatchObject({ code: "conflict" });
    expect(await Disposition.count({ where: { changeId: change.id } })).toBe(1);
  });
});

describe("a base that moves", () => {
  it("stops the decision until the proposal is brought up to date, with its edits reapplied and the rest told", async () => {
    const world = await floor(1);
    const first = await draft(world, textOf());
    await approve(world, first.id);
    const mine = await draft(world, textOf({ accel: 2500, speed: 210 }));
    const theirs = await draft(world, textOf({ speed: 180 }));
    await submitChange(world.engineer, act(mine.id));
    await approve(world, theirs.id);
    const request = await approvalOf(world, mine.id, true);
    await expect(decideChange(world.approver, { id: mine.id, request, ifMatch: null })).rejects.toThrow(
      "Bring it up to date",
    );
    expect((await showChange(world.engineer, mine.id)).stale).toContain("baseline");
    const rebased = await bringUpToDate(world.engineer, { id: mine.id, ifMatch: null });
    expect(rebased.reapplied.map(({ parameter }) => parameter)).toEqual(["acceleration", "acceleration"]);
    expect(rebased.notFitting.map(({ parameter }) => parameter)).toEqual(["max_speed", "max_speed"]);
    const now = await showChange(world.engineer, mine.id);
    expect(now.stale).toBeNull();
    expect(now.proposal.files[0]?.text).toBe(textOf({ accel: 2500, speed: 180 }));
    const again = await approvalOf(world, mine.id, true);
    const decided = await decideChange(world.approver, { id: mine.id, request: again, ifMatch: null });
    expect(decided.state).toBe("approved");
    expect((await ChangeRequest.findByPk(theirs.id))?.state).toBe("superseded");
  });

  it("lets only one of two changes of one model be approved at the same moment", async () => {
    const world = await floor(1);
    const [one, two] = [await draft(world, textOf()), await draft(world, textOf({ speed: 190 }))];
    for (const { id } of [one, two]) await submitChange(world.engineer, act(id));
    const requests = [await approvalOf(world, one.id, true), await approvalOf(world, two.id, true)];
    const both = await Promise.allSettled(
      [one, two].map(({ id }, index) =>
        decideChange(world.approver, { id, request: requests[index]!, ifMatch: null }),
      ),
    );
    expect(both.filter(({ status }) => status === "fulfilled")).toHaveLength(1);
  });
});

describe("moves", () => {
  it("refuses what the state table does not have, and says how things stand", async () => {
    const world = await floor(1);
    const change = await draft(world, textOf());
    await expect(releaseChange(world.engineer, act(change.id))).rejects.toThrow("is draft");
    await submitChange(world.engineer, act(change.id));
    await expect(submitChange(world.engineer, act(change.id))).rejects.toMatchObject({ code: "conflict" });
    await takeBackChange(world.engineer, act(change.id));
    await withdrawChange(world.engineer, act(change.id, "No longer needed."));
    await expect(
      editChange(world.engineer, { id: change.id, edit: edit(textOf()), ifMatch: null }),
    ).rejects.toThrow("withdrawn");
  });

  it("answers 412 to somebody who has seen an older state", async () => {
    const world = await floor(1);
    const change = await draft(world, textOf());
    await submitChange(world.engineer, act(change.id));
    const late = editChange(world.engineer, {
      id: change.id,
      edit: edit(textOf()),
      ifMatch: change.lockVersion,
    });
    await expect(late).rejects.toMatchObject({ code: "precondition_failed" });
  });

  it("does not submit a proposal that is its base unchanged", async () => {
    const world = await floor(1);
    const first = await draft(world, textOf());
    await approve(world, first.id);
    const nothing = await draft(world, textOf());
    await expect(submitChange(world.engineer, act(nothing.id))).rejects.toThrow("nothing to decide");
  });

  it("drafts a change once for one Idempotency-Key", async () => {
    const world = await floor(1);
    const input = {
      modelId: world.model.id,
      title: "Once",
      reason: "Only once.",
      class: "II" as const,
      note: "",
      files: file(textOf()),
    };
    const [one, two] = [
      await createChange(world.engineer, input, "key-0001"),
      await createChange(world.engineer, input, "key-0001"),
    ];
    expect(two.id).toBe(one.id);
    await expect(
      createChange(world.engineer, { ...input, title: "Twice" }, "key-0001"),
    ).rejects.toMatchObject({ code: "conflict" });
  });
});

describe("mails and the record of a change", () => {
  it("asks those who can decide and tells the author, names and asks first, parameters and effects in the text", async () => {
    const world = await floor(1);
    const change = await draft(world, textOf());
    await approve(world, change.id);
    const raised = await draft(world, textOf({ current: 900 }));
    await approve(world, raised.id);
    const mails = await OutboxMail.findAll({ where: { changeId: raised.id } });
    const asked = mails.find(
      ({ recipient, subject }) =>
        recipient.startsWith(world.approver.actor.name) && subject.includes("asks you to decide"),
    );
    expect(
      asked?.bodyText.startsWith(`${world.engineer.actor.name} asks you to decide on ${raised.label}`),
    ).toBe(true);
    expect(asked?.bodyText).toContain("X axis, run current: 0.8 A rms → 0.9 A rms");
    expect(asked?.bodyText).toMatch(/torque margin/i);
    expect(asked?.bodyHtml).not.toContain("<script");
    const told = mails.find(({ recipient }) => recipient.startsWith(world.engineer.actor.name));
    expect(told?.subject).toContain("has approved");
    expect(new Set(mails.map(({ messageId }) => messageId)).size).toBe(mails.length);
  });

  it("puts every act on the record, in a chain that holds", async () => {
    const world = await floor(1);
    const change = await draft(world, textOf());
    await approve(world, change.id);
    await releaseChange(world.engineer, act(change.id));
    const events = await RecordEvent.findAll({ where: { changeId: change.id }, order: [["seq", "ASC"]] });
    expect(events.map(({ action }) => action)).toEqual([
      "change.drafted",
      "change.submitted",
      "change.approved",
      "change.released",
    ]);
    expect((await verifyChain(world.engineer)).brokenAt).toBeNull();
  });
});
