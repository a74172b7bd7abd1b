import type { ReactNode } from "react";
import type { Level } from "@/lib/domain/levels";
import { LevelMark } from "./level-mark";

export interface NoticeProps {
  readonly title?: ReactNode;
  /** Puts the level's mark and word before the title. */
  readonly level?: Level | undefined;
  readonly children: ReactNode;
  /** What the reader can do about it. */
  readonly acts?: ReactNode;
  /** Read out when it appears: "alert" for what went wrong, "status" for what went well. */
  readonly live?: "alert" | "status" | undefined;
}

/** A ruled notice in the run of a page. */
export function Notice({ title, level, children, acts, live }: NoticeProps) {
  return (
    <div className="notice" role={live}>
      {(title !== undefined || level !== undefined) && (
        <p className="notice-title">
          {level && <LevelMark level={level} />}
          {title}
        </p>
      )}
      <div className="notice-words">{children}</div>
      {acts !== undefined && <div className="acts">{acts}</div>}
    </div>
  );
}
