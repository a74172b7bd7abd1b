"use client";

import { useEffect, useRef, useState } from "react";
import { answerMerge, type MergeAnswer, type MergeRequest } from "@/lib/review/merge-protocol";

/** A worker, or null where the browser gives none: the merge then runs in the page. */
function openWorker(): Worker | null {
  try {
    return new Worker(new URL("./merge-worker.ts", import.meta.url), { type: "module" });
  } catch {
    return null;
  }
}

/** The merge as chosen so far with what each choice does; null until the first answer, older answers are dropped. */
export function useMerge({ input, policy, choices }: Omit<MergeRequest, "id">): MergeAnswer | null {
  const [answer, setAnswer] = useState<MergeAnswer | null>(null);
  const worker = useRef<Worker | null>(null);
  const asked = useRef(0);
  useEffect(() => {
    const opened = openWorker();
    worker.current = opened;
    if (opened) {
      opened.onmessage = ({ data }: MessageEvent<MergeAnswer>) => {
        if (data.id === asked.current) setAnswer(data);
      };
      opened.onerror = () => {
        worker.current = null;
      };
    }
    return () => opened?.terminate();
  }, []);
  useEffect(() => {
    asked.current += 1;
    const request: MergeRequest = { id: asked.current, input, policy, choices };
    if (worker.current) {
      worker.current.postMessage(request);
      return;
    }
    const timer = setTimeout(() => setAnswer(answerMerge(request)));
    return () => clearTimeout(timer);
  }, [input, policy, choices]);
  return answer;
}
