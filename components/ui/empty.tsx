import type { ReactNode } from "react";

export interface EmptyProps {
  /** What belongs here, in one sentence. */
  readonly children: ReactNode;
  /** The act that fills it. */
  readonly act?: ReactNode;
}

/** An empty place: what belongs here and the act that fills it. */
export function Empty({ children, act }: EmptyProps) {
  return (
    <div className="empty">
      <p>{children}</p>
      {act !== undefined && <div className="acts">{act}</div>}
    </div>
  );
}
