"use client";

import { useEffect, useRef, useState } from "react";
import {
  answerPictures,
  type AxisPictures,
  type AxisPicturesRequest,
  type ChangeMaps,
  type ChangeMapsRequest,
  type PicturesAnswer,
  type PicturesRequest,
} from "@/lib/review/axis-pictures";

type Question<T> = T extends PicturesRequest ? Omit<T, "id"> : never;

/** One question in the worker's hands at a time; of those that come meanwhile only the newest is asked next. */
interface Line {
  readonly worker: Worker;
  busy: boolean;
  next: PicturesRequest | null;
}

/** A worker, or null where the browser gives none: the page then reckons by itself. */
function openWorker(): Worker | null {
  try {
    return new Worker(new URL("./axis-worker.ts", import.meta.url), { type: "module" });
  } catch {
    return null;
  }
}

function ask(line: Line, request: PicturesRequest): void {
  if (line.busy) {
    line.next = request;
    return;
  }
  line.busy = true;
  line.worker.postMessage(request);
}

function askNext(line: Line): void {
  const { next } = line;
  line.busy = false;
  line.next = null;
  if (next) ask(line, next);
}

/** The answer to the newest question, redrawn as fast as the worker answers; null before the first. */
export function usePictures(question: Question<AxisPicturesRequest>): AxisPictures | null;
export function usePictures(question: Question<ChangeMapsRequest>): ChangeMaps | null;
export function usePictures(question: Question<PicturesRequest>): PicturesAnswer | null {
  const [answer, setAnswer] = useState<PicturesAnswer | null>(null);
  const line = useRef<Line | null>(null);
  const asked = useRef(0);
  const latest = useRef<PicturesRequest | null>(null);
  useEffect(() => {
    const worker = openWorker();
    if (!worker) return;
    const opened: Line = { worker, busy: false, next: null };
    line.current = opened;
    worker.onmessage = ({ data }: MessageEvent<PicturesAnswer>) => {
      askNext(opened);
      setAnswer(data);
    };
    worker.onerror = () => {
      line.current = null;
      if (latest.current) setAnswer(answerPictures(latest.current));
    };
    return () => {
      line.current = null;
      worker.terminate();
    };
  }, []);
  useEffect(() => {
    asked.current += 1;
    const request = { ...question, id: asked.current };
    latest.current = request;
    if (line.current) ask(line.current, request);
    else setAnswer(answerPictures(request));
  }, [question]);
  return answer;
}
