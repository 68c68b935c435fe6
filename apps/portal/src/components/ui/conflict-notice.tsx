import type { ReactNode } from 'react';
import { Button } from './button.tsx';
import { Notice } from './notice.tsx';

export interface ConflictNoticeProps {
  /** Names the object: `The remark on balloon 4`. */
  what: string;
  mine: ReactNode;
  theirs: ReactNode;
  onKeepMine: () => void;
  onTakeTheirs: () => void;
}

/** Two people wrote to the same place: both values are shown, and nothing is written until one is chosen. */
export function ConflictNotice({ what, mine, theirs, onKeepMine, onTakeTheirs }: ConflictNoticeProps) {
  return (
    <Notice
      tone="attention"
      live
      title={`${what} was changed by somebody else while you were typing`}
      actions={
        <>
          <Button onClick={onKeepMine}>Write mine over it</Button>
          <Button onClick={onTakeTheirs}>Take the other and drop mine</Button>
        </>
      }
    >
      <div className="grid gap-3 sm:grid-cols-2">
        <div className="min-w-0 break-words">
          <p className="caption">Yours, not saved</p>
          {mine}
        </div>
        <div className="min-w-0 break-words">
          <p className="caption">On the server now</p>
          {theirs}
        </div>
      </div>
    </Notice>
  );
}
