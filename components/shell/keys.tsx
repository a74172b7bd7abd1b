"use client";

import { useRouter } from "next/navigation";
import { useEffect, useSyncExternalStore } from "react";
import { PLACES } from "./places";

const STORE = "keepstep.keys";
const CHANGED = "keepstep:keys";

function subscribe(changed: () => void): () => void {
  window.addEventListener("storage", changed);
  window.addEventListener(CHANGED, changed);
  return () => {
    window.removeEventListener("storage", changed);
    window.removeEventListener(CHANGED, changed);
  };
}

const read = (): boolean => window.localStorage.getItem(STORE) !== "off";
const onServer = (): boolean => true;

/** Whether this reader uses the single-purpose keys (WCAG 2.1.4 lets them be turned off); kept in this browser. */
export function useKeysOn(): [boolean, (on: boolean) => void] {
  const on = useSyncExternalStore(subscribe, read, onServer);
  return [
    on,
    (wanted) => {
      window.localStorage.setItem(STORE, wanted ? "on" : "off");
      window.dispatchEvent(new Event(CHANGED));
    },
  ];
}

/** Where a key leads, or null: Alt+Shift+1 … 6 along the strip, F1 to the help. */
export function keyTarget(
  event: Pick<KeyboardEvent, "key" | "code" | "altKey" | "shiftKey" | "ctrlKey" | "metaKey">,
): string | null {
  if (event.ctrlKey || event.metaKey) return null;
  if (event.key === "F1" && !event.altKey && !event.shiftKey) return "/help";
  if (!event.altKey || !event.shiftKey) return null;
  const digit = /^(?:Digit|Numpad)([1-6])$/.exec(event.code)?.[1];
  return digit === undefined ? null : (PLACES[Number(digit) - 1]?.href ?? null);
}

/** Listens for the keys while they are on; draws nothing. */
export function Keys() {
  const router = useRouter();
  const [on] = useKeysOn();
  useEffect(() => {
    if (!on) return;
    const follow = (event: KeyboardEvent): void => {
      const target = keyTarget(event);
      if (target === null) return;
      event.preventDefault();
      router.push(target);
    };
    window.addEventListener("keydown", follow);
    return () => window.removeEventListener("keydown", follow);
  }, [on, router]);
  return null;
}

/** Turns the single-purpose keys on and off. */
export function KeySwitch() {
  const [on, setOn] = useKeysOn();
  return (
    <label className="key-switch">
      <input type="checkbox" checked={on} onChange={(event) => setOn(event.target.checked)} />
      Keys that act at once (F1, Alt+Shift+1 to 6)
    </label>
  );
}
