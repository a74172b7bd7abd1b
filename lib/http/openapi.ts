import "server-only";
import { createDocument, type ZodOpenApiOperationObject, type ZodOpenApiPathsObject } from "zod-openapi";
import { z } from "zod";
import { POLICY_TABLE } from "@/lib/policies/table";
import { problemSchema } from "@/lib/schemas/common";
import type { Operation } from "@/lib/schemas/operation";
import { ALL_OPERATIONS } from "@/lib/schemas/operations/all";

const PROBLEM = {
  description: "Refused: what happened, what was kept, what to do (RFC 9457)",
  content: { "application/problem+json": { schema: problemSchema.meta({ id: "Problem" }) } },
};

/** What an operation asks of its caller, in a sentence. */
function demands({ action }: Operation): string {
  if (action === null) return "Open to anybody.";
  const { roles, scope } = POLICY_TABLE[action];
  const token =
    scope === null ? "Takes a person who signs in; no token." : `A token needs the scope ${scope}.`;
  return `Roles: ${roles.join(", ")}. ${token}`;
}

function answerOf({ answer, ifMatch }: Operation) {
  const etag = { ETag: { description: "Version of the object", schema: { type: "string" as const } } };
  return {
    description: "Done",
    ...(ifMatch ? { headers: etag } : {}),
    content:
      answer instanceof z.ZodType
        ? { "application/json": { schema: answer } }
        : { [answer.mediaType]: { schema: { type: "string" as const } } },
  };
}

function headersOf({ ifMatch, idempotent }: Operation): z.ZodObject | undefined {
  const version = z.string().meta({ description: 'The ETag that was read, e.g. "3"' });
  const key = z.string().min(8).max(200).optional();
  const shape = {
    ...(ifMatch ? { "If-Match": ifMatch === "required" ? version : version.optional() } : {}),
    ...(idempotent
      ? { "Idempotency-Key": key.meta({ description: "The same for the same act tried again" }) }
      : {}),
  };
  return Object.keys(shape).length === 0 ? undefined : z.object(shape);
}

/** Statuses with which this operation may refuse. */
function refusals({ action, method, ifMatch, params, body }: Operation): Record<string, typeof PROBLEM> {
  const statuses = [
    ...(action === null ? ["503"] : ["401", "403"]),
    ...(params ? ["404"] : []),
    ...(method === "GET" ? [] : ["409"]),
    ...(ifMatch ? ["412"] : []),
    ...(ifMatch === "required" ? ["428"] : []),
    ...(body ? ["413", "415", "422"] : []),
  ];
  return Object.fromEntries(statuses.map((status) => [status, PROBLEM]));
}

function describe(operation: Operation): ZodOpenApiOperationObject {
  const { id, summary, tag, params, query, body, action, status = 200 } = operation;
  const header = headersOf(operation);
  return {
    operationId: id,
    summary,
    description: demands(operation),
    tags: [tag],
    ...(action === null ? { security: [] } : {}),
    requestParams: {
      ...(params ? { path: params } : {}),
      ...(query ? { query } : {}),
      ...(header ? { header } : {}),
    },
    ...(body ? { requestBody: { required: true, content: { "application/json": { schema: body } } } } : {}),
    responses: { [`${status}`]: answerOf(operation), ...refusals(operation) },
  };
}

function paths(): ZodOpenApiPathsObject {
  const all: Record<string, Record<string, ZodOpenApiOperationObject>> = {};
  for (const operation of ALL_OPERATIONS)
    (all[operation.path] ??= {})[operation.method.toLowerCase()] = describe(operation);
  return all;
}

function build() {
  return createDocument({
    openapi: "3.1.0",
    info: {
      title: "Keepstep",
      version: "1",
      description:
        "The desk for the motion settings of stepper-driven machines. Numbers travel in SI units unless a name says otherwise; instants as ISO 8601. Checks are estimates from catalog data; the physical test and a competent person decide.",
    },
    servers: [{ url: "/api/v1" }],
    security: [{ token: [] }, { session: [] }],
    tags: [...new Set(ALL_OPERATIONS.map((operation) => operation.tag))].map((name) => ({ name })),
    paths: paths(),
    components: {
      securitySchemes: {
        token: { type: "http", scheme: "bearer", description: "Made under Settings, Tokens" },
        session: {
          type: "apiKey",
          in: "cookie",
          name: "next-auth.session-token",
          description: "The cookie of a person who signed in",
        },
      },
    },
  });
}

let document: ReturnType<typeof build> | undefined;

/** The OpenAPI 3.1 description of every operation, made of the schemas that check the requests. */
export function openApiDocument(): ReturnType<typeof build> {
  return (document ??= build());
}
