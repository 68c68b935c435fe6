import type { AuditEvent } from '@trammel/shared/audit';
import { Copyable } from '../../../components/ui/copyable.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { MomentWithZone } from '../../../components/ui/time.tsx';

export function AuditEventDialog({ event, onClose }: { event: AuditEvent; onClose: () => void }) {
  return (
    <Dialog open onClose={onClose} title={`Entry ${event.number}: ${event.summary}`} width="wide">
      <dl className="grid grid-cols-[auto_minmax(0,1fr)] items-baseline gap-x-4 gap-y-1">
        <dt className="text-pencil">Who</dt>
        <dd>
          {event.actor}, {event.organisation}
        </dd>
        <dt className="text-pencil">When</dt>
        <dd>
          <MomentWithZone at={event.at} />
        </dd>
        <dt className="text-pencil">Act</dt>
        <dd className="figures">{event.action}</dd>
        <dt className="text-pencil">Object</dt>
        <dd>
          <span className="figures">{event.objectType}</span>{' '}
          <Copyable value={event.objectId} what="object's identifier" />
        </dd>
        <dt className="text-pencil">Digest</dt>
        <dd>
          <Copyable value={event.hash} what="entry's digest" shorten={24} />
        </dd>
      </dl>
      <div className="grid gap-4 md:grid-cols-2">
        <Values title="Before" value={event.before} />
        <Values title="After" value={event.after} />
      </div>
    </Dialog>
  );
}

/** A block that scrolls sideways is reached by keyboard. */
const scroller = { role: 'region', tabIndex: 0 } as const;

function Values({ title, value }: { title: string; value: unknown }) {
  return (
    <div className="min-w-0">
      <h3 className="mb-1">{title}</h3>
      {value === null || value === undefined ? (
        <p className="text-pencil">nothing</p>
      ) : (
        <pre
          {...scroller}
          aria-label={title}
          className="figures max-h-80 overflow-auto border border-rule bg-paper p-2"
        >
          {JSON.stringify(value, null, 2)}
        </pre>
      )}
    </div>
  );
}
