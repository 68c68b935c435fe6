import { Link } from 'react-router-dom';
import type { Finding } from '@trammel/shared/checks';
import type { Weight } from '@trammel/shared/status';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { WeightBadge } from '../../../components/ui/state-badge.tsx';
import { countOf } from '../../../lib/format.ts';

const order: Weight[] = ['stops-submission', 'reviewer-decides', 'for-information'];
const heads: Record<Weight, string> = {
  'stops-submission': 'Stops submission',
  'reviewer-decides': 'Reviewer decides',
  'for-information': 'For information',
};

interface FindingListProps {
  findings: readonly Finding[];
  /** Where each finding can be mended; null where there is no such page for this person. */
  hrefOf: (finding: Finding) => string | null;
  truncated: boolean;
}

/** Findings by weight, each with its rule, its place as a link, and what mends it. */
export function FindingList({ findings, hrefOf, truncated }: FindingListProps) {
  if (findings.length === 0) {
    return (
      <EmptyState title="Nothing found">
        Every rule that the data can answer is met. The next step is the warrant.
      </EmptyState>
    );
  }
  return (
    <div className="flex flex-col gap-6">
      {order.map((weight) => {
        const group = findings.filter((finding) => finding.weight === weight);
        return group.length === 0 ? null : (
          <section key={weight} aria-label={heads[weight]}>
            <h2 className="mb-2 flex items-center gap-2">
              <WeightBadge weight={weight} /> <span className="figures text-pencil">{group.length}</span>
            </h2>
            <ul className="border-t border-rule">
              {group.map((finding) => (
                <FindingRow key={finding.key} finding={finding} href={hrefOf(finding)} />
              ))}
            </ul>
          </section>
        );
      })}
      {truncated && (
        <p className="text-pencil">
          Only the first {countOf(findings.length, 'finding', 'findings')} are listed; mend these and look
          again.
        </p>
      )}
    </div>
  );
}

function FindingRow({ finding, href }: { finding: Finding; href: string | null }) {
  return (
    <li className="grid gap-x-4 gap-y-1 border-b border-rule bg-sheet px-3 py-2 sm:grid-cols-[9rem_minmax(0,1fr)]">
      <div className="flex flex-wrap items-baseline gap-x-2 sm:flex-col">
        {href === null ? (
          <span>{placeInWords(finding)}</span>
        ) : (
          <Link to={href}>{placeInWords(finding)}</Link>
        )}
        <span className="caption figures">
          {finding.rule === 'safety' ? 'caution' : `rule ${finding.rule}`}
        </span>
      </div>
      <div>
        <p className="font-semibold">{finding.title}</p>
        <p>{finding.detail}</p>
        <p className="text-pencil">{finding.remedy}</p>
      </div>
    </li>
  );
}

function placeInWords({ place }: Finding): string {
  const parts = [
    place.balloon === null ? null : `Balloon ${place.balloon}`,
    place.stream,
    place.piece === null ? null : `piece ${place.piece}`,
  ].filter((part) => part !== null);
  if (parts.length > 0) return parts.join(', ');
  return {
    package: 'Package',
    warrant: 'Warrant',
    element: 'Element',
    gauge: 'Gauge',
    stream: 'Stream',
    piece: 'Piece',
    characteristic: 'Drawing',
    reading: 'Reading',
  }[place.kind];
}
