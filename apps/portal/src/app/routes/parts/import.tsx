import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { Notice } from '../../../components/ui/notice.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { revisionQuery } from '../../../features/parts/api.ts';
import { CharacteristicImport } from '../../../features/table-imports/components/characteristic-import.tsx';
import { paths } from '../../../lib/paths.ts';

export function Component() {
  const { revisionId = '' } = useParams();
  const { data: revision } = useSuspenseQuery(revisionQuery(revisionId));
  const back = paths.revision(revision.partId, revision.id);
  return (
    <>
      <nav aria-label="Path" className="text-[0.875rem]">
        <Link to={paths.part(revision.partId)}>{revision.partNumber}</Link> <span aria-hidden="true">/</span>{' '}
        <Link to={back}>revision {revision.code}</Link>
      </nav>
      <PageHead
        title={`Import characteristics into ${revision.partNumber} revision ${revision.code}`}
        lead="Nothing is written before you have seen what would be, and confirmed it."
      />
      {revision.abilities.edit ? (
        <CharacteristicImport revisionId={revision.id} backTo={back} />
      ) : (
        <Notice title={`Revision ${revision.code} is ${revision.state} and no longer changes`}>
          Create the next revision as a copy and import into it.
        </Notice>
      )}
    </>
  );
}
