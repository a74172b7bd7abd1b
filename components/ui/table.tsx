import type { ComponentProps, ReactNode } from "react";
import { ScrollRegion } from "./scroll-region";

export interface TableProps {
  /** Names the table; hidden where a heading beside it already says it. */
  readonly caption: string;
  readonly captionHidden?: boolean | undefined;
  /** `thead` and `tbody`. */
  readonly children: ReactNode;
  readonly className?: string | undefined;
}

/** A ruled table. On a narrow screen it scrolls in its own frame. */
export function Table({ caption, captionHidden = false, children, className }: TableProps) {
  return (
    <ScrollRegion label={caption}>
      <table role="table" className={className === undefined ? "ruled" : `ruled ${className}`}>
        <caption className={captionHidden ? "visually-hidden" : undefined}>{caption}</caption>
        {children}
      </table>
    </ScrollRegion>
  );
}

function classes(own: string, given: string | undefined): string {
  return given === undefined ? own : `${own} ${given}`;
}

/** A column head; `number` sets it over right-aligned figures. */
export function Head({ number = false, className, ...rest }: ComponentProps<"th"> & { number?: boolean }) {
  return <th scope="col" {...rest} className={classes(number ? "number" : "words", className)} />;
}

/** A cell of right-aligned figures. */
export function NumberCell({ className, ...rest }: ComponentProps<"td">) {
  return <td {...rest} className={classes("number", className)} />;
}
