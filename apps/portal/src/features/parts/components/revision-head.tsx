import { useSuspenseQuery } from '@tanstack/react-query';
import type { RevisionResponse } from '@trammel/shared/parts';
import { useState, type ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { TitleBlock } from '../../../components/package/title-block.tsx';
import { Button } from '../../../components/ui/button.tsx';
import { LinkButton } from '../../../components/ui/link-button.tsx';
import { Day, Moment } from '../../../components/ui/time.tsx';
import { paths } from '../../../lib/paths.ts';
import { revisionQuery } from '../api.ts';
import { RevisionDialog } from './revision-dialog.tsx';
import { RevisionState } from './revision-state.tsx';

/** Head of a drawing revision's page; what follows is composed by the route. */
export function RevisionFrame({
  revisionId,
  children,
}: {
  revisionId: string;
  children: (revision: RevisionResponse) => ReactNode;
}) {
  const { data: revision } = useSuspenseQuery(revisionQuery(revisionId));
  const [changing, setChanging] = useState(false);
  const facts: [string, ReactNode][] = [
    ['Date', revision.drawingDate ? <Day key="day" on={revision.drawingDate} /> : null],
    ['Change order', revision.changeOrder],
    ['Standard', revision.tolerancingStandard.toUpperCase()],
    ['Limits read', revision.roundingRule === 'absolute' ? 'absolute' : 'ASTM E29 rounding'],
    ['General tolerance', revision.generalTolerance],
    [
      'Released',
      revision.releasedAt ? (
        <>
          {revision.releasedBy}, <Moment at={revision.releasedAt} />
        </>
      ) : null,
    ],
    ['Note', revision.note],
  ];
  return (
    <div className="flex flex-col gap-5">
      <title>{`${revision.partNumber} rev ${revision.code} · Trammel`}</title>
      <nav aria-label="Path" className="no-print -mb-3 text-[0.875rem]">
        <Link to={paths.parts}>Parts</Link> <span aria-hidden="true">/</span>{' '}
        <Link to={paths.part(revision.partId)}>{revision.partNumber}</Link>
      </nav>
      <TitleBlock
        isPageHead
        partNumber={revision.partNumber}
        revision={revision.code}
        description={revision.partName}
        state={<RevisionState state={revision.state} />}
      />
      <div className="-mt-2 flex flex-wrap items-start justify-between gap-3">
        <dl className="flex flex-wrap gap-x-6 gap-y-1">
          {facts
            .filter(([, value]) => value !== null && value !== '')
            .map(([caption, value]) => (
              <div key={caption} className="min-w-0">
                <dt className="caption">{caption}</dt>
                <dd className="break-words whitespace-pre-line">{value}</dd>
              </div>
            ))}
        </dl>
        <div className="no-print flex flex-wrap gap-2">
          {revision.copiedFrom && (
            <LinkButton to={paths.comparison(revision.partId, revision.id, revision.copiedFrom.id)}>
              Compare with {revision.copiedFrom.code}
            </LinkButton>
          )}
          {revision.abilities.edit && <Button onClick={() => setChanging(true)}>Drawing details</Button>}
        </div>
      </div>
      {children(revision)}
      {changing && <RevisionDialog revision={revision} onClose={() => setChanging(false)} />}
    </div>
  );
}
