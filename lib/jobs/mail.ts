import "server-only";
import { now } from "@/lib/server/clock";
import { enqueue } from "@/lib/server/queue";
import { MAIL_JOB } from "@/lib/services/mail/enqueue";
import { nextMailDue, sendDueMails } from "@/lib/services/mail/send-due";
import type { Job } from "./register";

/** Sends what the outbox holds. Woken by each act, by itself when a mail is to be tried again, and once a minute. */
export const mailJob: Job = {
  name: MAIL_JOB,
  schedule: "* * * * *",
  work: async () => {
    await sendDueMails(now);
    const startAfter = await nextMailDue();
    if (startAfter) await enqueue(MAIL_JOB, {}, { startAfter, singletonKey: "again", singletonSeconds: 5 });
  },
};
