import type { z } from "zod";
import type { Action } from "@/lib/domain/actions";

export type Method = "GET" | "POST" | "PUT" | "PATCH" | "DELETE";

/**
 * One door of the API: what it takes, what it answers, and which act lib/policies is asked about. Routes answer
 * through these, the OpenAPI description is made from them, and the access test walks them all.
 */
export interface Operation {
  readonly id: string;
  readonly method: Method;
  /** Below /api/v1, with OpenAPI parameters: "/machines/{id}". */
  readonly path: string;
  /** Null: open to anybody, signed in or not. */
  readonly action: Action | null;
  readonly summary: string;
  readonly tag: string;
  readonly params?: z.ZodObject;
  readonly query?: z.ZodObject;
  readonly body?: z.ZodType;
  /** Largest request body in bytes; DEFAULT_BODY_BYTES otherwise. */
  readonly maxBytes?: number;
  readonly answer: z.ZodType | { readonly mediaType: string };
  readonly status?: 200 | 201;
  /** `required`: 428 without If-Match. */
  readonly ifMatch?: "required" | "optional";
  /** Honours Idempotency-Key. */
  readonly idempotent?: boolean;
}

export const DEFAULT_BODY_BYTES = 1_000_000;

/** Keeps the literal types of an operation, so that its handler sees the parsed shapes. */
export function operation<const O extends Operation>(definition: O): O {
  return definition;
}
