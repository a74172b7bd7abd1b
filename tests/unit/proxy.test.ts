import { NextRequest } from "next/server";
import { describe, expect, it } from "vitest";
import { config, proxy } from "@/proxy";

function answer(path: string, headers: Record<string, string> = {}): Headers {
  return proxy(new NextRequest(`http://127.0.0.1:3000${path}`, { headers })).headers;
}

function nonceOf(policy: string | null): string | undefined {
  return /'nonce-([^']+)'/.exec(policy ?? "")?.[1];
}

describe("proxy", () => {
  it("lets scripts run by a nonce of this answer alone", () => {
    const [first, second] = [answer("/floor"), answer("/floor")].map((headers) =>
      headers.get("content-security-policy"),
    );
    expect(nonceOf(first ?? null)).toMatch(/^[A-Za-z0-9+/=]{40,}$/);
    expect(nonceOf(first ?? null)).not.toBe(nonceOf(second ?? null));
    expect(/script-src ([^;]+)/.exec(first ?? "")?.[1]).not.toMatch(/unsafe-inline|unsafe-eval|https?:/);
  });

  it("closes objects, frames, foreign forms and foreign hosts", () => {
    const policy = answer("/floor").get("content-security-policy") ?? "";
    for (const rule of [
      "default-src 'self'",
      "object-src 'none'",
      "frame-ancestors 'none'",
      "form-action 'self'",
    ])
      expect(policy).toContain(rule);
    expect(policy).not.toMatch(/https?:|\*/);
  });

  it("hands nonce and path to the page, whatever the request claimed", () => {
    const headers = answer("/changes/7?tab=text", { "x-keepstep-path": "/elsewhere", "x-nonce": "guessed" });
    expect(headers.get("x-middleware-request-x-keepstep-path")).toBe("/changes/7?tab=text");
    expect(headers.get("x-middleware-request-x-nonce")).toBe(nonceOf(headers.get("content-security-policy")));
  });

  it("looks after pages, not after the API and built files", () => {
    const pattern = new RegExp(`^${config.matcher[0]?.source ?? ""}$`);
    for (const path of ["/", "/floor", "/apiary", "/machines/7"]) expect(pattern.test(path)).toBe(true);
    for (const path of ["/api/v1/check", "/_next/static/chunk.js"]) expect(pattern.test(path)).toBe(false);
  });
});
