import pino from "pino";
import { expect, test } from "vitest";
import { LOG_REDACTION } from "@/lib/server/logger";

function lineOf(entry: object): string {
  let line = "";
  pino({ redact: LOG_REDACTION }, { write: (text: string) => (line += text) }).info(entry, "done");
  return line;
}

test.each([
  { password: "opensesame" },
  { body: { newPassword: "opensesame", name: "Vera" } },
  { request: { headers: { authorization: "Bearer opensesame", cookie: "opensesame" } } },
  { made: { token: "opensesame" } },
])("a line leaves out what could sign somebody in: %j", (entry) => {
  const line = lineOf(entry);
  expect(line).not.toContain("opensesame");
  expect(line).toContain("(left out)");
  expect(line).toContain("done");
});

test("a line keeps everything else", () => {
  expect(JSON.parse(lineOf({ machine: "DG-104", levels: { over: 2 } }))).toMatchObject({
    machine: "DG-104",
    levels: { over: 2 },
    msg: "done",
  });
});
