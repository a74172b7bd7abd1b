import { createServer } from "node:net";
import { describe, expect, test } from "vitest";
import { isFree, parsePort, pickPort } from "../../../scripts/lib/ports.mjs";

async function whileHeld<T>(work: (port: number) => Promise<T>): Promise<T> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const address = server.address();
  try {
    return await work(typeof address === "object" ? address!.port : 0);
  } finally {
    await new Promise((resolve) => server.close(resolve));
  }
}

describe("a port", () => {
  test("falls back when none is given", () => {
    expect(parsePort(undefined, 3000)).toBe(3000);
    expect(parsePort("", 3000)).toBe(3000);
    expect(parsePort("8080", 3000)).toBe(8080);
  });

  test.each(["0", "65536", "1e3", "3000 ", "-5", "http"])("%j is refused", (text) => {
    expect(() => parsePort(text, 3000)).toThrow(`from 1 to 65535, but is "${text}"`);
  });

  test("that is held is not free, and another one is picked", async () => {
    await whileHeld(async (port) => {
      expect(await isFree(port)).toBe(false);
      expect(await pickPort(port)).not.toBe(port);
    });
  });

  test("that is preferred and free is kept", async () => {
    const port = await pickPort(undefined);
    expect(await pickPort(port)).toBe(port);
  });
});
