"use client";

import { useEffect, useState } from "react";
import { outlineOf, type OutlineStretch } from "@/lib/diff/outline";
import { reviseText } from "@/lib/diff/revise-text";
import type { RevisionRequest } from "./revision-worker";

/** A worker, or null where the browser gives none: the work is then done in the page. */
function openWorker(): Worker | null {
  try {
    return new Worker(new URL("./revision-worker.ts", import.meta.url), { type: "module" });
  } catch {
    return null;
  }
}

/** Was / To be of two long texts; null until it is worked out. */
export function useRevision({ was, toBe }: RevisionRequest): readonly OutlineStretch[] | null {
  const [stretches, setStretches] = useState<readonly OutlineStretch[] | null>(null);
  useEffect(() => {
    const worker = openWorker();
    const here = (): void => setStretches(outlineOf(reviseText(was, toBe)));
    if (worker) {
      worker.onmessage = ({ data }: MessageEvent<OutlineStretch[]>) => setStretches(data);
      worker.onerror = here;
      worker.postMessage({ was, toBe } satisfies RevisionRequest);
    }
    const timer = worker ? undefined : setTimeout(here);
    return () => {
      worker?.terminate();
      clearTimeout(timer);
    };
  }, [was, toBe]);
  return stretches;
}
