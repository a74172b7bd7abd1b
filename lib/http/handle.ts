import "server-only";
import type { z } from "zod";
import { decide } from "@/lib/policies/decide";
import type { Operation } from "@/lib/schemas/operation";
import { DEFAULT_BODY_BYTES } from "@/lib/schemas/operation";
import { now } from "@/lib/server/clock";
import type { Context } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { requestActor } from "./actor";
import { errorResponse, invalidRequest } from "./problem";

type Parsed<S> = S extends z.ZodType ? z.output<S> : undefined;

export interface Asked<O extends Operation> {
  /** Null where the operation is open to anybody: nobody in particular asks. */
  readonly context: O["action"] extends null ? null : Context;
  readonly params: Parsed<O["params"]>;
  readonly query: Parsed<O["query"]>;
  readonly body: Parsed<O["body"]>;
  /** Version that the caller has seen, from If-Match; null without one. */
  readonly ifMatch: number | null;
  readonly idempotencyKey: string | null;
  readonly request: Request;
}

interface RouteArguments {
  readonly params: Promise<Record<string, string | string[] | undefined>>;
}

/** An answer with a version to give as ETag. */
export class Versioned {
  constructor(
    readonly body: unknown,
    readonly version: number,
  ) {}
}

/**
 * Makes a route of an operation: actor, policy, origin, body, schema, then the given use case; its result becomes
 * JSON (a Response goes out as it is), every refusal application/problem+json.
 */
export function handle<const O extends Operation>(
  operation: O,
  respond: (asked: Asked<O>) => Promise<unknown>,
) {
  async function route(request: Request, { params }: RouteArguments): Promise<Response> {
    try {
      const context = await admit(operation, request);
      const asked = await parse(operation, { request, context, params: await params });
      return asked instanceof Response ? asked : answer(operation, await respond(asked));
    } catch (error) {
      return errorResponse(error);
    }
  }
  return Object.assign(route, { operation });
}

async function admit(operation: Operation, request: Request): Promise<Context | null> {
  if (operation.action === null) return null;
  const actor = await requestActor();
  const verdict = decide(actor, operation.action);
  if (!actor)
    throw new ServiceError("unauthenticated", "Sign in, or send a valid token as Authorization: Bearer.");
  if (!verdict.allowed) throw new ServiceError("forbidden", verdict.reason);
  if (operation.method !== "GET" && actor.kind === "person") refuseForeignOrigin(request);
  return { actor, now: now() };
}

/** A browser tells where a write comes from; only our own pages may use the cookie. */
function refuseForeignOrigin(request: Request): void {
  const origin = request.headers.get("origin");
  const site = request.headers.get("sec-fetch-site");
  const host = origin !== null && URL.canParse(origin) ? new URL(origin).host : null;
  const foreign = origin !== null && host !== request.headers.get("host");
  if (foreign || (site !== null && site !== "same-origin" && site !== "none"))
    throw new ServiceError("forbidden", "This request comes from another site. Nothing was done.");
}

async function parse<O extends Operation>(
  operation: O,
  raw: { request: Request; context: Context | null; params: Record<string, unknown> },
): Promise<Asked<O> | Response> {
  const { request, context } = raw;
  const params = operation.params?.safeParse(raw.params);
  if (params?.success === false) return invalidRequest(params.error, "path");
  const query = operation.query?.safeParse(queryOf(request));
  if (query?.success === false) return invalidRequest(query.error, "query");
  const body = operation.body?.safeParse(await readBody(operation, request));
  if (body?.success === false) return invalidRequest(body.error, "body");
  return {
    context,
    params: params?.data,
    query: query?.data,
    body: body?.data,
    ifMatch: ifMatchOf(operation, request),
    idempotencyKey: operation.idempotent ? idempotencyKeyOf(request) : null,
    request,
  } as Asked<O>;
}

function queryOf(request: Request): Record<string, string> {
  return Object.fromEntries([...new URL(request.url).searchParams].filter(([, value]) => value !== ""));
}

async function readBody(operation: Operation, request: Request): Promise<unknown> {
  const type = request.headers.get("content-type") ?? "";
  if (type.startsWith("multipart/form-data"))
    throw new ServiceError("unsupported", "Send JSON (application/json).");
  const text = await readText(request, operation.maxBytes ?? DEFAULT_BODY_BYTES);
  if (text === "") return {};
  if (!/^application\/json\b/i.test(type))
    throw new ServiceError("unsupported", "Send JSON (Content-Type: application/json).");
  try {
    return JSON.parse(text) as unknown;
  } catch (error) {
    throw new ServiceError(
      "invalid",
      `The body is not JSON: ${(error as Error).message}. Nothing was stored.`,
    );
  }
}

/** Reads a body while counting, so that an endless one is refused and not gathered. */
async function readText(request: Request, maxBytes: number): Promise<string> {
  if (!request.body) return "";
  const tooLarge = new ServiceError(
    "too_large",
    `The body is larger than ${Math.round(maxBytes / 1e5) / 10} MB. Nothing was stored.`,
  );
  if (Number(request.headers.get("content-length") ?? 0) > maxBytes) throw tooLarge;
  const chunks: Uint8Array[] = [];
  let size = 0;
  for await (const chunk of request.body as unknown as AsyncIterable<Uint8Array>) {
    size += chunk.byteLength;
    if (size > maxBytes) throw tooLarge;
    chunks.push(chunk);
  }
  return new TextDecoder("utf-8").decode(Buffer.concat(chunks));
}

function ifMatchOf(operation: Operation, request: Request): number | null {
  const header = request.headers.get("if-match");
  if (header === null && operation.ifMatch === "required")
    throw new ServiceError(
      "precondition_required",
      'Send If-Match with the ETag that you have read, e.g. If-Match: "3".',
    );
  if (header === null) return null;
  const version = /^(?:W\/)?"(\d{1,9})"$/.exec(header.trim())?.[1];
  if (version === undefined)
    throw new ServiceError("precondition_failed", "If-Match does not name a version of this object.");
  return Number(version);
}

function idempotencyKeyOf(request: Request): string | null {
  const key = request.headers.get("idempotency-key");
  if (key !== null && (key.length < 8 || key.length > 200))
    throw new ServiceError("invalid", "An Idempotency-Key has 8 to 200 characters.");
  return key;
}

function answer(operation: Operation, result: unknown): Response {
  if (result instanceof Response) return result;
  const versioned = result instanceof Versioned;
  return new Response(JSON.stringify((versioned ? result.body : result) ?? {}), {
    status: operation.status ?? 200,
    headers: {
      "content-type": "application/json",
      "cache-control": "no-store",
      "x-content-type-options": "nosniff",
      ...(versioned ? { etag: `"${result.version}"` } : {}),
    },
  });
}
