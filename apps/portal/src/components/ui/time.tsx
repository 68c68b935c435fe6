import { showDay, showDue, showMoment, showMomentWithZone, daysUntil } from '../../lib/format.ts';
import { cn } from '../../lib/cn.ts';

/** A moment in the reader's zone; the zone and UTC on hover. */
export function Moment({ at, wrap }: { at: string; wrap?: boolean }) {
  return (
    <time
      dateTime={at}
      title={showMomentWithZone(at)}
      className={cn('figures', !wrap && 'whitespace-nowrap')}
    >
      {showMoment(at)}
    </time>
  );
}

/** A moment with its zone always shown: for signatures. */
export function MomentWithZone({ at }: { at: string }) {
  return (
    <time dateTime={at} className="figures">
      {showMomentWithZone(at)}
    </time>
  );
}

/** A calendar date. */
export function Day({ on }: { on: string }) {
  return (
    <time dateTime={on} className="figures whitespace-nowrap">
      {showDay(on)}
    </time>
  );
}

/** A due date with the days left; what is overdue says so in words. */
export function DueDay({ on, settled = false }: { on: string; settled?: boolean }) {
  const late = !settled && daysUntil(on) < 0;
  return (
    <span className="inline-flex flex-wrap gap-x-2">
      <Day on={on} />
      {!settled && (
        <span className={cn('text-[0.875rem]', late ? 'font-semibold text-vermilion' : 'text-pencil')}>
          {showDue(on)}
        </span>
      )}
    </span>
  );
}
