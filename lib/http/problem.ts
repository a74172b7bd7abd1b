import "server-only";
import type { z } from "zod";
import { logger } from "@/lib/server/logger";
import type { Problem } from "@/lib/schemas/common";
import type { ServiceErrorCode } from "@/lib/services/kernel/errors";
import { ServiceError } from "@/lib/services/kernel/errors";

const STATUS: Record<ServiceErrorCode, { status: number; title: string }> = {
  unauthenticated: { status: 401, title: "Not signed in" },
  forbidden: { status: 403, title: "Not allowed" },
  not_found: { status: 404, title: "Not found" },
  invalid: { status: 422, title: "Not valid" },
  conflict: { status: 409, title: "Conflict" },
  precondition_failed: { status: 412, title: "Changed meanwhile" },
  precondition_required: { status: 428, title: "If-Match is needed" },
  too_large: { status: 413, title: "Too large" },
  unsupported: { status: 415, title: "Not a type that is taken here" },
  throttled: { status: 429, title: "Too many tries" },
  unavailable: { status: 503, title: "Not available" },
};

function problemResponse(problem: Problem, more: Record<string, unknown> = {}): Response {
  return new Response(JSON.stringify({ ...more, ...problem }), {
    status: problem.status,
    headers: {
      "content-type": "application/problem+json",
      "cache-control": "no-store",
      ...(problem.status === 401 ? { "www-authenticate": 'Bearer realm="keepstep"' } : {}),
    },
  });
}

/** JSON Pointer (RFC 6901) of a zod path. */
export function pointerOf(path: readonly PropertyKey[]): string {
  return path.map((part) => `/${String(part).replaceAll("~", "~0").replaceAll("/", "~1")}`).join("");
}

export function invalidRequest(error: z.ZodError, where: "body" | "query" | "path"): Response {
  const errors = error.issues.map((issue) => ({ pointer: pointerOf(issue.path), detail: issue.message }));
  const first = errors[0] ?? { pointer: "", detail: "The request does not fit." };
  return problemResponse({
    type: "about:blank",
    title: "Not valid",
    status: where === "path" ? 404 : 422,
    detail: `${where === "body" ? "The request body" : `The ${where}`} does not fit at ${first.pointer || "its root"}: ${first.detail} Nothing was stored.`,
    code: where === "path" ? "not_found" : "invalid",
    pointer: first.pointer,
    errors,
  });
}

/** Any thrown thing as application/problem+json (RFC 9457); only our own refusals speak to the caller. */
export function errorResponse(error: unknown): Response {
  if (error instanceof ServiceError) {
    const { status, title } = STATUS[error.code];
    return problemResponse(
      { type: "about:blank", title, status, detail: error.message, code: error.code, pointer: error.pointer },
      error.details,
    );
  }
  logger.error({ err: error }, "request failed");
  return problemResponse({
    type: "about:blank",
    title: "Something failed here",
    status: 500,
    detail:
      "The server could not finish this. Nothing of it was stored; try again, and tell your administrator if it stays so.",
    code: "internal",
    pointer: null,
  });
}
