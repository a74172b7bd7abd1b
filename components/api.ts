import { problemSchema, type Problem } from "@/lib/schemas/common";
import type { Method } from "@/lib/schemas/operation";

/** A refusal of the API: the sentence for people, and the fields it is about. */
export class ProblemError extends Error {
  readonly status: number;
  readonly code: string;
  readonly problem: Problem;
  /** Members beside the standard ones, such as what stands now after a 412. */
  readonly details: Readonly<Record<string, unknown>>;

  constructor(problem: Problem, details: Readonly<Record<string, unknown>> = {}) {
    super(problem.detail);
    this.name = "ProblemError";
    this.status = problem.status;
    this.code = problem.code;
    this.problem = problem;
    this.details = details;
  }
}

export interface CallOptions {
  readonly body?: unknown;
  /** The version that was read; goes out as If-Match. */
  readonly ifMatch?: number;
  /** The same key for the same act tried again. */
  readonly idempotencyKey?: string;
  readonly signal?: AbortSignal;
}

const UNREACHABLE: Problem = {
  type: "about:blank",
  title: "Not reached",
  status: 0,
  detail:
    "Keepstep was not reached. Whether this was stored is not known; what you typed is still here. Check the connection and try again.",
  code: "unreachable",
  pointer: null,
};

const unreadable = (status: number): Problem => ({
  type: "about:blank",
  title: "Not understood",
  status,
  detail: `The server answered with status ${status} and no reason. What you typed is still here; try again.`,
  code: "unreadable",
  pointer: null,
});

function headersOf({ body, ifMatch, idempotencyKey }: CallOptions): Record<string, string> {
  return {
    accept: "application/json",
    ...(body === undefined ? {} : { "content-type": "application/json" }),
    ...(ifMatch === undefined ? {} : { "if-match": `"${ifMatch}"` }),
    ...(idempotencyKey === undefined ? {} : { "idempotency-key": idempotencyKey }),
  };
}

async function send(method: Method, path: string, options: CallOptions): Promise<Response> {
  try {
    return await fetch(`/api/v1${path}`, {
      method,
      headers: headersOf(options),
      body: options.body === undefined ? null : JSON.stringify(options.body),
      signal: options.signal ?? null,
    });
  } catch (error) {
    if (options.signal?.aborted) throw error;
    throw new ProblemError(UNREACHABLE);
  }
}

/** Calls one operation below /api/v1 as the signed-in person; a refusal is thrown as ProblemError. */
export async function apiCall<T>(method: Method, path: string, options: CallOptions = {}): Promise<T> {
  const response = await send(method, path, options);
  const text = await response.text();
  if (response.ok) return (text === "" ? undefined : JSON.parse(text)) as T;
  throw problemOf(response.status, text);
}

function problemOf(status: number, text: string): ProblemError {
  try {
    const answer = JSON.parse(text) as Record<string, unknown>;
    return new ProblemError(problemSchema.parse(answer), answer);
  } catch {
    return new ProblemError(unreadable(status));
  }
}

/** The sentence to show for whatever was thrown. */
export function sentenceOf(error: unknown): string {
  if (error instanceof ProblemError) return error.message;
  return "Something failed in this page. Nothing was sent; load the page again.";
}

/** The sentences of a refusal by field, named as react-hook-form names them: /axes/0/motorId is axes.0.motorId. */
export function fieldErrors(error: unknown): Readonly<Record<string, string>> {
  if (!(error instanceof ProblemError)) return {};
  const { errors, pointer, detail } = error.problem;
  const all = errors ?? (pointer === null ? [] : [{ pointer, detail }]);
  const named = all.filter((one) => one.pointer !== "").map((one) => [fieldOf(one.pointer), one.detail]);
  return Object.fromEntries(named.reverse()) as Record<string, string>;
}

function fieldOf(pointer: string): string {
  const parts = pointer.slice(1).split("/");
  return parts.map((part) => part.replaceAll("~1", "/").replaceAll("~0", "~")).join(".");
}
