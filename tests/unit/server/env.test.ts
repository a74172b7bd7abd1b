import { describe, expect, test } from "vitest";
import { readEnv } from "@/lib/server/env";

describe("settings", () => {
  test("have what a build needs when nothing is set", () => {
    expect(readEnv({})).toEqual({
      databaseUrl: undefined,
      authSecret: undefined,
      publicUrl: "http://127.0.0.1:3000",
      smtpUrl: undefined,
      mailFrom: "Keepstep <keepstep@example.test>",
      logLevel: "info",
      demo: false,
      mailFolder: undefined,
    });
  });

  test("set to nothing count as not set", () => {
    expect(readEnv({ SMTP_URL: "", KEEPSTEP_DEMO: "", LOG_LEVEL: "" })).toEqual(readEnv({}));
  });

  test("give the public address without a slash at its end", () => {
    expect(readEnv({ NEXTAUTH_URL: "https://desk.example.test/keep//" }).publicUrl).toBe(
      "https://desk.example.test/keep",
    );
  });

  test.each([
    ["DATABASE_URL", "mysql://127.0.0.1/desk"],
    ["SMTP_URL", "127.0.0.1:25"],
    ["NEXTAUTH_URL", "desk.example.test"],
    ["NEXTAUTH_SECRET", "short"],
    ["LOG_LEVEL", "loud"],
    ["KEEPSTEP_DEMO", "yes"],
  ])("%s=%s is refused by name", (name, value) => {
    expect(() => readEnv({ [name]: value })).toThrow(`These settings cannot be used: ${name} (`);
  });

  test("that are refused are all named, and their values are not shown", () => {
    const read = () => readEnv({ NEXTAUTH_SECRET: "short", DATABASE_URL: "opensesame" });
    expect(read).toThrow(/DATABASE_URL.*NEXTAUTH_SECRET/);
    expect(read).not.toThrow(/opensesame/);
  });
});
