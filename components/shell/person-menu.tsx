"use client";

import { signOut } from "next-auth/react";
import Link from "next/link";
import { useEffect, useId, useRef, useState } from "react";
import { KeySwitch } from "./keys";
import { PLACES } from "./places";

export interface PersonMenuProps {
  readonly name: string;
  /** The role in a word, e.g. "approver". */
  readonly role: string;
}

/** Closes on Escape, on a press outside and when the focus leaves. */
function useClosing(open: boolean, close: (back: boolean) => void) {
  const frame = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (!open) return;
    const outside = (event: Event): void => {
      if (event.target instanceof Node && !frame.current?.contains(event.target)) close(false);
    };
    const escape = (event: KeyboardEvent): void => {
      if (event.key === "Escape") close(true);
    };
    document.addEventListener("pointerdown", outside);
    document.addEventListener("focusin", outside);
    document.addEventListener("keydown", escape);
    return () => {
      document.removeEventListener("pointerdown", outside);
      document.removeEventListener("focusin", outside);
      document.removeEventListener("keydown", escape);
    };
  }, [open, close]);
  return frame;
}

function Search() {
  return (
    <form className="menu-search" role="search" action="/search" method="get">
      <input
        className="entry"
        type="search"
        name="q"
        aria-label="Find"
        placeholder="Find a machine, a change, an act"
      />
    </form>
  );
}

/** The person's menu at the right of the strip; on a phone it also holds the search and every place. */
export function PersonMenu({ name, role }: PersonMenuProps) {
  const [open, setOpen] = useState(false);
  const button = useRef<HTMLButtonElement>(null);
  const id = useId();
  const frame = useClosing(open, (back) => {
    setOpen(false);
    if (back) button.current?.focus();
  });
  const shut = (): void => setOpen(false);
  return (
    <div className="person" ref={frame}>
      <button
        ref={button}
        type="button"
        className="person-button"
        aria-label={`${name}, menu`}
        aria-expanded={open}
        aria-controls={id}
        onClick={() => setOpen(!open)}
      >
        <span className="person-name">{name}</span>
        <span className="person-menu-word">Menu</span>
      </button>
      <div className="menu" id={id} hidden={!open}>
        <p className="menu-person">
          {name}
          <span className="quiet">, {role}</span>
        </p>
        <Search />
        <ul className="menu-places">
          {PLACES.map(({ href, label }) => (
            <li key={href}>
              <Link href={href} onClick={shut}>
                {label}
              </Link>
            </li>
          ))}
        </ul>
        <ul>
          <li>
            <Link href="/settings" onClick={shut}>
              Settings
            </Link>
          </li>
          <li>
            <Link href="/help" onClick={shut} aria-keyshortcuts="F1">
              Help
            </Link>
          </li>
        </ul>
        <KeySwitch />
        <button
          type="button"
          className="button button-plain"
          onClick={() => void signOut({ callbackUrl: "/sign-in" })}
        >
          Sign out
        </button>
      </div>
    </div>
  );
}
