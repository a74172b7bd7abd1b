"use client";

import { useEffect, useState, type RefObject } from "react";
import { axisTitle } from "@/components/findings/axis-title";
import { Button } from "@/components/ui/button";
import { groupsBeyond, WIDTHS, type FloorLayout } from "./column-groups";

export interface FurtherRightProps {
  readonly scroller: RefObject<HTMLDivElement | null>;
  readonly layout: FloorLayout;
}

/** How many axes lie, in part or whole, beyond the right edge of the scroll container. */
function useAxesBeyond({ scroller, layout }: FurtherRightProps): number {
  const [count, setCount] = useState(0);
  useEffect(() => {
    const element = scroller.current;
    if (!element) return;
    const measure = (): void =>
      setCount(groupsBeyond(element.scrollLeft + element.clientWidth, layout).length);
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    element.addEventListener("scroll", measure, { passive: true });
    return () => {
      observer.disconnect();
      element.removeEventListener("scroll", measure);
    };
  }, [scroller, layout]);
  return count;
}

/** Names the axes that a narrow window hides and leads to them. */
export function FurtherRight({ scroller, layout }: FurtherRightProps) {
  const count = useAxesBeyond({ scroller, layout });
  if (count === 0) return null;
  return (
    <p className="floor-further">
      Further right:{" "}
      {groupsBeyond(-1, layout)
        .slice(-count)
        .map(({ axis, left, start }) => (
          <Button
            key={start}
            variant="quiet"
            onClick={() => scroller.current?.scrollTo({ left: left - WIDTHS.leading[0], behavior: "smooth" })}
          >
            {axisTitle(axis)}
          </Button>
        ))}
    </p>
  );
}
