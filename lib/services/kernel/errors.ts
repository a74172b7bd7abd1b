import "server-only";

/** Closed list; lib/http alone maps it to statuses. */
export type ServiceErrorCode =
  | "unauthenticated"
  | "forbidden"
  | "not_found"
  | "invalid"
  | "conflict"
  | "precondition_failed"
  | "precondition_required"
  | "too_large"
  | "unsupported"
  | "throttled"
  | "unavailable";

/** A refusal that the caller can understand: what happened, what was kept, what to do. */
export class ServiceError extends Error {
  readonly code: ServiceErrorCode;
  /** JSON Pointer to the offending field of the request, e.g. "/files/0/text". */
  readonly pointer: string | null;
  readonly details: Readonly<Record<string, unknown>>;

  constructor(
    code: ServiceErrorCode,
    message: string,
    more: { pointer?: string; details?: Record<string, unknown> } = {},
  ) {
    super(message);
    this.name = "ServiceError";
    this.code = code;
    this.pointer = more.pointer ?? null;
    this.details = more.details ?? {};
  }
}

export function notFound(what: string): ServiceError {
  return new ServiceError("not_found", `There is no such ${what}.`);
}
