import { useEffect, useId, useRef, type ReactNode } from 'react';
import { cn } from '../../lib/cn.ts';
import { Button } from './button.tsx';

export interface DialogProps {
  open: boolean;
  onClose: () => void;
  /** Names the object in words. */
  title: string;
  children: ReactNode;
  /** Buttons; the act first, leaving it last. */
  footer?: ReactNode;
  width?: 'narrow' | 'wide';
}

const widths = { narrow: 'max-w-lg', wide: 'max-w-3xl' };

/** The browser's own modal dialog: it holds the focus, Escape leaves it, and focus returns where it was. */
export function Dialog({ open, onClose, title, children, footer, width = 'narrow' }: DialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const titleId = useId();
  useEffect(() => {
    const element = dialog.current;
    if (!open || element === null) return;
    const before = document.activeElement;
    if (!element.open) element.showModal();
    return () => {
      element.close();
      if (before instanceof HTMLElement && before.isConnected) before.focus();
    };
  }, [open]);
  if (!open) return null;
  return (
    <dialog
      ref={dialog}
      aria-labelledby={titleId}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      className={cn(
        'm-auto max-h-[92dvh] w-[calc(100%-24px)] overflow-y-auto rounded-max border border-pencil bg-sheet text-graphite',
        widths[width],
      )}
    >
      <div className="flex items-start justify-between gap-4 border-b border-rule px-5 py-3">
        <h2 id={titleId} className="min-w-0 break-words">
          {title}
        </h2>
        <Button weight="quiet" size="small" onClick={onClose}>
          Close
        </Button>
      </div>
      <div className="flex flex-col gap-4 px-5 py-4">{children}</div>
      {footer && <div className="flex flex-wrap gap-2 border-t border-rule px-5 py-3">{footer}</div>}
    </dialog>
  );
}
