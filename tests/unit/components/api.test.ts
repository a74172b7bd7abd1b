import { afterEach, expect, test, vi } from "vitest";
import { apiCall, fieldErrors, ProblemError, sentenceOf } from "@/components/api";

const answering = (status: number, body: string) => {
  const fetched = vi.fn(async () => new Response(body, { status }));
  vi.stubGlobal("fetch", fetched);
  return fetched;
};
afterEach(() => vi.unstubAllGlobals());

const problem = {
  type: "about:blank",
  title: "Not valid",
  status: 422,
  detail: "Does not fit at /name.",
  code: "invalid",
  pointer: "/name",
  errors: [
    { pointer: "/name", detail: "Give it a name." },
    { pointer: "/axes/0/motorId", detail: "Choose a motor." },
  ],
};

test("a call carries its body as JSON, the version read and the key of the act", async () => {
  const fetched = answering(200, '{"id":"a"}');
  expect(
    await apiCall("PUT", "/sites/a", { body: { name: "B" }, ifMatch: 3, idempotencyKey: "key-0001" }),
  ).toEqual({
    id: "a",
  });
  expect(fetched).toHaveBeenCalledWith(
    "/api/v1/sites/a",
    expect.objectContaining({
      method: "PUT",
      body: '{"name":"B"}',
      headers: expect.objectContaining({ "if-match": '"3"', "idempotency-key": "key-0001" }),
    }),
  );
});

test("a refusal is thrown with its sentence and the fields it is about, named as the form names them", async () => {
  answering(422, JSON.stringify({ ...problem, current: { version: 4 } }));
  const error = await apiCall("POST", "/sites", { body: {} }).catch((thrown: unknown) => thrown);
  expect(error).toBeInstanceOf(ProblemError);
  expect(sentenceOf(error)).toBe("Does not fit at /name.");
  expect(fieldErrors(error)).toEqual({ name: "Give it a name.", "axes.0.motorId": "Choose a motor." });
  expect((error as ProblemError).details.current).toEqual({ version: 4 });
});

test("a refusal with a pointer alone stands at that field", async () => {
  answering(409, JSON.stringify({ ...problem, errors: undefined, pointer: "/code", detail: "Taken." }));
  const error = await apiCall("POST", "/sites").catch((thrown: unknown) => thrown);
  expect(fieldErrors(error)).toEqual({ code: "Taken." });
});

test("an answer that is no problem document, and no answer at all, have a sentence too", async () => {
  answering(502, "<html>");
  await expect(apiCall("GET", "/floor")).rejects.toThrow(/status 502/);
  vi.stubGlobal("fetch", () => Promise.reject(new TypeError("Failed to fetch")));
  await expect(apiCall("GET", "/floor")).rejects.toThrow(/was not reached/);
});
