"use client";

import { useEffect } from "react";
import { joinWords } from "@/lib/domain/sentences";
import { checkWords } from "@/lib/review/counter-words";
import type { OrderInput, OrderStep, SafeOrder } from "@/lib/solve/safe-order";
import { SheetSection } from "@/components/ui/sheet";
import { placeWords } from "./counter-moves";
import { kindsOf, type Kinds } from "./kinds";
import { useSolver } from "./use-solver";

export interface OrderSectionProps {
  readonly basis: OrderInput;
  /** Whether the values before are what the machine was read to run; else what it was required to run. */
  readonly fromReadings: boolean;
}

/** In which order the new values may be typed one after the other, for who does not write the whole text at once. */
export function OrderSection({ basis, fromReadings }: OrderSectionProps) {
  const { answer, ask } = useSolver();
  useEffect(() => ask({ kind: "order", input: basis }), [ask, basis]);
  const from = fromReadings ? "from what the machine was read to run" : "from what was required before";
  return (
    <SheetSection title="Order of typing" note={from}>
      <div aria-live="polite">
        {answer?.kind === "order" ? (
          <OrderWords order={answer.order} kinds={kindsOf(basis.assembly)} />
        ) : (
          <p className="quiet">Searching …</p>
        )}
      </div>
    </SheetSection>
  );
}

/** The order found, or why there is none. */
export function OrderWords({ order, kinds }: { readonly order: SafeOrder; readonly kinds: Kinds }) {
  if (order.kind === "needless")
    return <p className="quiet">At most one key changes; there is no state in between.</p>;
  if (order.kind === "found")
    return (
      <>
        <p>
          Where the values are typed one by one, type them in this order: every state in between passes the
          checks. Writing the whole text at once needs no order.
        </p>
        <ol>
          {order.steps.map((step) => (
            <Step
              key={`${step.source.path} ${step.source.start} ${step.source.key}`}
              step={step}
              kinds={kinds}
            />
          ))}
        </ol>
      </>
    );
  return (
    <>
      <p className="caution">
        {order.kind === "none"
          ? "There is no order in which every state in between passes the checks."
          : `No such order was found among ${order.tried} states; not every order was tried.`}{" "}
        Write the whole text at once, with the motors off.
      </p>
      {order.blocking.length > 0 && (
        <p>In between would be over limit or past checking: {joinWords(order.blocking.map(checkWords))}.</p>
      )}
    </>
  );
}

function sideWords(side: OrderStep["was"]): string {
  if (side === null) return "not in the text";
  return side.unit === null ? String(side.value) : `${side.value}\u00a0${side.unit}`;
}

function Step({ step, kinds }: { readonly step: OrderStep; readonly kinds: Kinds }) {
  const { parameters, was, toBe, source } = step;
  return (
    <li>
      {joinWords(parameters.map((place) => placeWords(place, kinds)))}: {sideWords(was)} → {sideWords(toBe)}{" "}
      <span className="quiet">
        {source.key}, {source.path}, line {source.line}
      </span>
    </li>
  );
}
