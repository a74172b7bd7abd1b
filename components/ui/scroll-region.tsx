"use client";

import { useEffect, useRef, useState, type ReactNode } from "react";

/** A sideways scroll container that takes the keyboard's focus only while there is something to scroll to. */
export function ScrollRegion({ label, children }: { readonly label: string; readonly children: ReactNode }) {
  const region = useRef<HTMLDivElement>(null);
  const [scrolls, setScrolls] = useState(false);
  useEffect(() => {
    const element = region.current;
    if (!element) return;
    const measure = (): void => setScrolls(element.scrollWidth > element.clientWidth + 1);
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return (
    <div
      ref={region}
      className="scroll-region"
      {...(scrolls ? { tabIndex: 0, role: "region", "aria-label": label } : {})}
    >
      {children}
    </div>
  );
}
