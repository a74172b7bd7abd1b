"use client";

import { useVirtualizer } from "@tanstack/react-virtual";
import { useMemo, useRef, useState, type CSSProperties, type ReactNode } from "react";
import { plural } from "@/lib/domain/sentences";
import type { OutlineStretch } from "@/lib/diff/outline";
import { splitLines } from "@/lib/diff/text-lines";
import type { RevisionLine } from "@/lib/diff/types";
import { BreakLine } from "./drawing-revision";
import { revisionItems, type RevisionItem } from "./revision-items";
import { isFoldable, RevisionRow, type LineContext } from "./revision-row";
import { useRevision } from "./use-revision";

export interface LongRevisionProps {
  readonly path: string;
  readonly was: string;
  readonly toBe: string;
  readonly letters?: LineContext["letters"];
  readonly keep?: LineContext["keep"];
  readonly index?: number | undefined;
  /** What stands below a line. */
  readonly noteOf?: ((line: RevisionLine) => ReactNode) | undefined;
}

/** Pixels of a line, as the style sheet has it. */
const LINE = 24;

/** Was / To be of a long text: worked out beside the page, and only the rows in sight are laid out. */
export function LongRevision({ was, toBe, ...rest }: LongRevisionProps) {
  const stretches = useRevision({ was, toBe });
  if (!stretches) return <p className="quiet">Holding both texts against each other …</p>;
  return <Rows {...rest} toBe={toBe} stretches={stretches} />;
}

type RowsProps = Omit<LongRevisionProps, "was"> & { readonly stretches: readonly OutlineStretch[] };

function Rows({ path, toBe, stretches, letters, keep, index = 0, noteOf }: RowsProps) {
  const [opened, setOpened] = useState<ReadonlySet<number>>(new Set());
  const [fold, setFold] = useState(false);
  const scroller = useRef<HTMLDivElement>(null);
  const context = useMemo<LineContext>(
    () => ({ letters, keep, notes: undefined, index }),
    [letters, keep, index],
  );
  const items = useMemo(() => {
    const lines = opened.size === 0 ? [] : splitLines(toBe);
    const folded = (line: RevisionLine): boolean => fold && isFoldable(line, context);
    return revisionItems(stretches, { opened, folded, toBe: () => lines });
  }, [stretches, opened, fold, context, toBe]);
  // eslint-disable-next-line react-hooks/incompatible-library -- the library's object changes on its own; nothing here memoizes it
  const virtualizer = useVirtualizer({
    count: items.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => LINE,
    overscan: 20,
  });
  const digits = { "--digits": String(widest(stretches)).length } as CSSProperties;
  return (
    <div className="code-sheet code-revision" style={digits}>
      <label className="fold-quiet">
        <input type="checkbox" checked={fold} onChange={() => setFold(!fold)} />
        fold lines where only spacing or a comment differs
      </label>
      <div
        ref={scroller}
        className="long-revision"
        role="group"
        aria-label={`Revision of ${path}`}
        tabIndex={0}
      >
        <div style={{ height: virtualizer.getTotalSize() }}>
          {virtualizer.getVirtualItems().map(({ index: at, start }) => (
            <div
              key={at}
              ref={virtualizer.measureElement}
              data-index={at}
              className="long-revision-row"
              style={{ transform: `translateY(${start}px)` }}
            >
              <Item
                item={items[at]}
                context={context}
                noteOf={noteOf}
                onOpen={(stretch) => setOpened(new Set([...opened, stretch]))}
              />
            </div>
          ))}
        </div>
      </div>
    </div>
  );
}

/** The largest line number. */
function widest(stretches: readonly OutlineStretch[]): number {
  const last = stretches.at(-1);
  if (!last) return 1;
  if (last.closed) return last.toBeLine + last.count;
  const line = last.lines.at(-1);
  return line?.toBeLine ?? line?.wasLine ?? 1;
}

interface ItemProps {
  readonly item: RevisionItem | undefined;
  readonly context: LineContext;
  readonly noteOf: LongRevisionProps["noteOf"];
  readonly onOpen: (stretch: number) => void;
}

function Item({ item, context, noteOf, onOpen }: ItemProps) {
  if (!item) return null;
  if (item.kind === "line")
    return (
      <>
        <RevisionRow line={item.line} context={context} />
        {noteOf?.(item.line)}
      </>
    );
  return (
    <button type="button" className="break-button" onClick={() => onOpen(item.stretch)}>
      <BreakLine />
      <span className="break-words">{plural(item.count, "line")} as before, open</span>
    </button>
  );
}
