"use client";

import { type ReactNode, useEffect, useId, useRef } from "react";

interface DialogProps {
  readonly open: boolean;
  /** Called when it is closed by Escape or its own button; set `open` to false there. */
  readonly onClose: () => void;
  readonly title: string;
  readonly children: ReactNode;
}

/**
 * A modal dialog on the browser's own <dialog>: it keeps the focus inside,
 * closes on Escape and gives the focus back to where it was. Its content is
 * only there while it is open, so forms start afresh.
 */
export function Dialog({ open, onClose, title, children }: DialogProps) {
  const box = useRef<HTMLDialogElement>(null);
  const titleId = useId();

  useEffect(() => {
    const dialog = box.current;
    if (open && dialog && !dialog.open) dialog.showModal();
    if (!open && dialog?.open) dialog.close();
  }, [open]);

  return (
    <dialog
      ref={box}
      aria-labelledby={titleId}
      onClose={onClose}
      className="sheet w-[min(36rem,calc(100vw-1.5rem))] max-h-[calc(100dvh-1.5rem)] flex-col overflow-hidden border-ink open:flex"
    >
      {open ? (
        // The box inside scrolls, not the dialog: see the red pane in globals.css.
        <div className="min-h-0 overflow-y-auto p-5">
          <div className="mb-4 flex items-baseline justify-between gap-4">
            <h2 id={titleId} className="text-xl font-bold">
              {title}
            </h2>
            <button type="button" className="act" onClick={() => box.current?.close()}>
              Close
            </button>
          </div>
          {children}
        </div>
      ) : null}
    </dialog>
  );
}
