import { useState, type ReactNode } from 'react';
import { reasonOf } from '../../lib/api-problem.ts';
import { Button } from './button.tsx';
import { Dialog } from './dialog.tsx';
import { Notice } from './notice.tsx';

export interface ConfirmDialogProps {
  open: boolean;
  onClose: () => void;
  /** A question that names the object: `Withdraw the request for TD-20417?` */
  title: string;
  /** What follows, and whether it can be taken back. */
  consequence: ReactNode;
  /** The act as a verb: `Withdraw the request`. */
  confirmLabel: string;
  danger?: boolean;
  /** Closes the dialog when it succeeds; a refusal is shown inside. */
  onConfirm: () => Promise<unknown>;
  children?: ReactNode;
}

/** Asks once, with the consequence. */
export function ConfirmDialog(props: ConfirmDialogProps) {
  return props.open ? <Question {...props} /> : null;
}

function Question({
  onClose,
  title,
  consequence,
  confirmLabel,
  danger,
  onConfirm,
  children,
}: ConfirmDialogProps) {
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const confirm = async () => {
    setBusy(true);
    setFailure(null);
    try {
      await onConfirm();
      onClose();
    } catch (error) {
      setFailure(reasonOf(error));
      setBusy(false);
    }
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={title}
      footer={
        <>
          <Button
            weight={danger ? 'danger' : 'primary'}
            busy={busy}
            busyLabel="Working…"
            onClick={() => void confirm()}
          >
            {confirmLabel}
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </>
      }
    >
      {failure && (
        <Notice tone="failure" live>
          {failure}
        </Notice>
      )}
      <div>{consequence}</div>
      {children}
    </Dialog>
  );
}
