"use client";

import { useEffect, useId, useRef, type ReactNode } from "react";

export interface DialogProps {
  readonly open: boolean;
  /** Asked for by Escape, by the browser or by a press outside. */
  readonly onClose: () => void;
  readonly title: ReactNode;
  readonly children: ReactNode;
  readonly acts?: ReactNode;
}

/** The browser's own modal dialog: it keeps the focus inside and gives it back on closing. */
export function Dialog({ open, onClose, title, children, acts }: DialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const titleId = useId();
  useEffect(() => {
    const element = dialog.current;
    if (!element) return;
    if (open && !element.open) element.showModal();
    if (!open && element.open) element.close();
  }, [open]);
  return (
    <dialog
      ref={dialog}
      className="dialog"
      aria-labelledby={titleId}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      onClick={(event) => {
        if (event.target === dialog.current) onClose();
      }}
    >
      <div className="dialog-inner">
        <h2 id={titleId}>{title}</h2>
        {children}
        {acts !== undefined && <div className="acts">{acts}</div>}
      </div>
    </dialog>
  );
}
