"use client";

import { useWindowVirtualizer } from "@tanstack/react-virtual";
import Link from "next/link";
import { useLayoutEffect, useRef, useState } from "react";
import type { FloorColumn, FloorRow } from "@/lib/domain/floor";
import { joinWords, plural } from "@/lib/domain/sentences";
import { CellMark } from "./cell-mark";
import { offRequired } from "./cell-words";
import type { FloorGridProps } from "./floor-grid";
import { StandingMark } from "./standing-mark";

/** Pixels of a machine with nothing to tell; the true heights are measured. */
const USUAL = 68;
const NAMED_UNREAD = 3;

function unreadWords(names: readonly string[]): string {
  if (names.length <= NAMED_UNREAD) return `not read: ${joinWords(names)}`;
  const more = plural(names.length - NAMED_UNREAD, "more", "more");
  return `not read: ${names.slice(0, NAMED_UNREAD).join(", ")} and ${more}`;
}

function Machine({ row, columns, href }: { row: FloorRow; columns: readonly FloorColumn[]; href: string }) {
  const { told, notRead } = offRequired(row, columns);
  return (
    <>
      <Link href={href} prefetch={false} className="floor-list-machine">
        <span className="floor-list-serial">{row.serial}</span>
        <span className="quiet">
          {row.modelName}, {row.siteName}
        </span>
        <span className="floor-list-sentence">
          <StandingMark standing={row.standing} /> {row.sentence}
        </span>
      </Link>
      {(told.length > 0 || notRead.length > 0) && (
        <ul>
          {told.map(({ key, cell, words }) => (
            <li key={key}>
              <CellMark cell={cell} />
              {cell.kind === "deviation" ? `${words} (permitted deviation)` : words}
            </li>
          ))}
          {notRead.length > 0 && (
            <li>
              <CellMark cell={{ kind: "not_read", title: "" }} />
              {unreadWords(notRead)}
            </li>
          )}
        </ul>
      )}
    </>
  );
}

/** The floor on a phone: machines with their sentence and what is off, in words. */
export function FloorList({ columns, rows, machineBase }: FloorGridProps) {
  const list = useRef<HTMLUListElement>(null);
  const [margin, setMargin] = useState(0);
  useLayoutEffect(() => {
    const top = list.current?.getBoundingClientRect().top ?? 0;
    setMargin(top + window.scrollY);
  }, []);
  const virtualizer = useWindowVirtualizer({
    count: rows.length,
    estimateSize: () => USUAL,
    overscan: 8,
    scrollMargin: margin,
    getItemKey: (index) => rows[index]?.machineId ?? index,
  });
  return (
    <ul ref={list} className="floor-list" style={{ height: virtualizer.getTotalSize() }}>
      {virtualizer.getVirtualItems().map(({ index, key, start }) => {
        const row = rows[index];
        return (
          row && (
            <li
              key={key}
              ref={virtualizer.measureElement}
              data-index={index}
              aria-setsize={rows.length}
              aria-posinset={index + 1}
              style={{ transform: `translateY(${start - margin}px)` }}
            >
              <Machine row={row} columns={columns} href={`${machineBase}/${row.machineId}`} />
            </li>
          )
        );
      })}
    </ul>
  );
}
