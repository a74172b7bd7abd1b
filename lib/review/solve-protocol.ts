import { safeOrder, type OrderInput, type SafeOrder } from "@/lib/solve/safe-order";
import { counterEdit, type CounterEdit } from "./counter-proposal";
import type { CheckInput } from "./types";

/** What a page asks its solver for: a counter-proposal to a text, or an order of typing several values. */
export type SolveRequest =
  | { readonly kind: "counter"; readonly input: CheckInput }
  | { readonly kind: "order"; readonly input: OrderInput };

export type SolveAnswer =
  | { readonly kind: "counter"; readonly edit: CounterEdit }
  | { readonly kind: "order"; readonly order: SafeOrder };

/** The solver's whole work. */
export function answerSolve(request: SolveRequest): SolveAnswer {
  return request.kind === "counter"
    ? { kind: "counter", edit: counterEdit(request.input) }
    : { kind: "order", order: safeOrder(request.input) };
}
