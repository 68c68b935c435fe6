import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, useParams, useSearchParams } from 'react-router-dom';
import { ComparisonTable } from '../../../features/characteristics/components/comparison-table.tsx';
import { revisionQuery } from '../../../features/parts/api.ts';
import { paths } from '../../../lib/paths.ts';

export function Component() {
  const { revisionId = '' } = useParams();
  const [search] = useSearchParams();
  const { data: revision } = useSuspenseQuery(revisionQuery(revisionId));
  return (
    <>
      <nav aria-label="Path" className="text-[0.875rem]">
        <Link to={paths.part(revision.partId)}>{revision.partNumber}</Link> <span aria-hidden="true">/</span>{' '}
        <Link to={paths.revision(revision.partId, revision.id)}>revision {revision.code}</Link>
      </nav>
      <ComparisonTable
        revisionId={revisionId}
        withId={search.get('with') ?? ''}
        partNumber={revision.partNumber}
      />
    </>
  );
}
