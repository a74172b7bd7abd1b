import { Op } from "sequelize";
import { SYSTEM } from "../lib/domain/roles";
import { stopQueue } from "../lib/server/queue";
import { sequelize } from "../lib/server/sequelize";
import { withTransaction } from "../lib/services/kernel/transaction";
import { appendRecord } from "../lib/services/record/append";
import { Site } from "../models/catalog";
import { OutboxMail } from "../models/outbox";
import { RecordEvent } from "../models/record";
import { FIRST_SITE, loadFleet } from "./demo/load";
import { loadPeople } from "./demo/people";

/** Mails of the story's past are kept as sent; only those of the last days go out, for the page of caught mails. */
const OLD_MAIL_DAYS = 4;
const LOADED = "demo.loaded";

async function load(): Promise<void> {
  const now = new Date();
  const people = await loadPeople(now);
  if ((await RecordEvent.count({ where: { action: LOADED } })) > 0) return;
  if ((await Site.count({ where: { code: FIRST_SITE } })) > 0)
    throw new Error(
      "An earlier loading of the demo fleet stopped half-way. Remove the folder of the database (.keepstep) and start again.",
    );
  await loadFleet({ people, now }, (words) => process.stdout.write(`${words}\n`));
  const old = new Date(now.getTime() - OLD_MAIL_DAYS * 86_400_000);
  await OutboxMail.update({ state: "sent", sentAt: old }, { where: { createdAt: { [Op.lt]: old } } });
  const object = { type: "desk", id: "demo", label: "Demo fleet" };
  await withTransaction({ actor: SYSTEM, now }, (tx) => appendRecord(tx, { action: LOADED, object }));
}

try {
  await load();
} finally {
  await stopQueue();
  await sequelize.close();
}
