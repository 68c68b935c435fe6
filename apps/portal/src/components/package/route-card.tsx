import { useId, useState } from 'react';
import { Link } from 'react-router-dom';
import type { RouteCardRound } from '@trammel/shared/submissions';
import type { Station } from '@trammel/shared/status';
import { cn } from '../../lib/cn.ts';
import { Button } from '../ui/button.tsx';
import { PackageStateBadge } from '../ui/state-badge.tsx';
import { Moment } from '../ui/time.tsx';

export const stationWords: Record<Station, string> = {
  request: 'Request',
  measurements: 'Measurements',
  evidence: 'Evidence',
  check: 'Check',
  warrant: 'Warrant',
  review: 'Review',
  disposition: 'Disposition',
};

export interface RouteCardProps {
  /** Every round of the package, in any order; the newest is the line in hand. */
  rounds: readonly RouteCardRound[];
  /** The round that the page shows. */
  shownId?: string;
  /** Address of a round, where older ones can be opened. */
  roundHref?: (round: RouteCardRound) => string;
}

type StationMark = RouteCardRound['stations'][number];

/** Travels with the package across the top of its page: finished stations are stamped, the one in hand names the hands. */
export function RouteCard({ rounds, shownId, roundHref }: RouteCardProps) {
  const [older, setOlder] = useState(false);
  const id = useId();
  const newestFirst = [...rounds].sort((a, b) => b.round - a.round);
  const [newest, ...rest] = newestFirst;
  if (newest === undefined) return null;
  // An older round that the page shows stays open: it is what the person is reading.
  const isOpen = older || rest.some((round) => round.submissionId === shownId);
  return (
    <section aria-label="Route card" className="keep-whole border border-graphite bg-sheet">
      <Line round={newest} href={shownId === newest.submissionId ? undefined : roundHref?.(newest)} />
      {rest.length > 0 && (
        <div className="border-t border-rule">
          <Button
            weight="quiet"
            size="small"
            className="no-print m-1"
            aria-expanded={isOpen}
            aria-controls={id}
            onClick={() => setOlder(!isOpen)}
          >
            {isOpen ? 'Hide' : 'Show'}{' '}
            {rest.length === 1 ? 'the earlier round' : `${rest.length} earlier rounds`}
          </Button>
          <div id={id} className={cn(!isOpen && 'hidden print:block')}>
            {rest.map((round) => (
              <div key={round.submissionId} className="border-t border-rule">
                <Line
                  round={round}
                  href={shownId === round.submissionId ? undefined : roundHref?.(round)}
                  past
                />
              </div>
            ))}
          </div>
        </div>
      )}
    </section>
  );
}

function Line({ round, href, past }: { round: RouteCardRound; href?: string | undefined; past?: boolean }) {
  return (
    <div>
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1 border-b border-rule px-2 py-1">
        <span className="font-semibold">
          {href === undefined ? `Round ${round.round}` : <Link to={href}>Round {round.round}</Link>}
        </span>
        <PackageStateBadge state={round.state} />
      </div>
      <ol className="grid gap-px bg-rule md:grid-cols-7">
        {round.stations.map((mark) => (
          <StationCell key={mark.station} mark={mark} past={past} />
        ))}
      </ol>
    </div>
  );
}

const stateWords: Record<StationMark['state'], string> = {
  done: 'done',
  'in-hand': 'in hand',
  ahead: 'not yet reached',
  skipped: 'not needed',
};

function StationCell({ mark, past }: { mark: StationMark; past?: boolean | undefined }) {
  const inHand = mark.state === 'in-hand';
  return (
    <li
      aria-current={inHand && !past ? 'step' : undefined}
      className={cn(
        'grid min-w-0 grid-cols-[128px_minmax(0,1fr)] gap-x-2 px-2 py-1 text-[0.8125rem] leading-4.5 md:block md:min-h-16',
        inHand
          ? 'bg-sheet shadow-[inset_0_3px_0_var(--marking)] max-md:shadow-[inset_3px_0_0_var(--marking)]'
          : 'bg-sheet',
      )}
    >
      <p
        className={cn(
          'flex items-center gap-1.5',
          inHand ? 'font-semibold' : mark.state === 'done' ? '' : 'text-pencil',
        )}
      >
        <Stamp state={mark.state} />
        {stationWords[mark.station]}
        <span className="sr-only">, {stateWords[mark.state]}</span>
      </p>
      <div className="min-w-0 break-words">
        {inHand && mark.who && <p className="font-medium text-marking">with {mark.who}</p>}
        {!inHand && mark.who && <p>{mark.who}</p>}
        {mark.at && (
          <p className="text-pencil">
            <Moment at={mark.at} wrap />
          </p>
        )}
        {mark.note && <p className="text-pencil">{mark.note}</p>}
      </div>
    </li>
  );
}

/** Stamped ring with a tick, filled point, empty ring, dash. */
function Stamp({ state }: { state: StationMark['state'] }) {
  return (
    <svg
      aria-hidden="true"
      viewBox="0 0 12 12"
      className="size-3 shrink-0 fill-none stroke-current stroke-[1.4]"
    >
      {state === 'done' && (
        <g className="stroke-verdigris">
          <circle cx="6" cy="6" r="5" />
          <path d="M3.4 6.2l1.9 1.9 3.4-4" />
        </g>
      )}
      {state === 'in-hand' && <path d="M6 1l5 5-5 5-5-5z" className="fill-marking stroke-none" />}
      {state === 'ahead' && (
        <circle cx="6" cy="6" r="4.5" className="stroke-pencil" strokeDasharray="2 1.6" />
      )}
      {state === 'skipped' && <path d="M2 6h8" className="stroke-pencil" />}
    </svg>
  );
}
