import { type ReactNode, useEffect, useId, useRef } from "react";

interface Props {
  open: boolean;
  title: string;
  /** Called on Escape, on the form's closing and on a click beside the dialog. */
  onClose: () => void;
  children: ReactNode;
}

/** A modal dialogue on the browser's own element: it keeps the focus, closes on Escape and gives the focus back. */
export function Dialog({ open, title, onClose, children }: Props) {
  const element = useRef<HTMLDialogElement>(null);
  const titleId = useId();

  useEffect(() => {
    const dialog = element.current;
    if (dialog === null) return;
    if (open && !dialog.open) dialog.showModal();
    if (!open && dialog.open) dialog.close();
  }, [open]);

  return (
    <dialog
      ref={element}
      className="dialog"
      aria-labelledby={titleId}
      onClose={onClose}
      onClick={(event) => {
        if (event.target === element.current) element.current.close();
      }}
    >
      <h2 id={titleId} className="mb-4">
        {title}
      </h2>
      {open && children}
    </dialog>
  );
}
