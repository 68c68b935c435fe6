import { useSuspenseQuery } from '@tanstack/react-query';
import type { RevisionResponse } from '@trammel/shared/parts';
import { useParams } from 'react-router-dom';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { DownloadLink, LinkButton } from '../../../components/ui/link-button.tsx';
import { characteristicsQuery } from '../../../features/characteristics/api.ts';
import { CharacteristicsTable } from '../../../features/characteristics/components/characteristics-table.tsx';
import { DrawingPanel } from '../../../features/parts/components/drawing-panel.tsx';
import { ReleasePanel } from '../../../features/parts/components/release-panel.tsx';
import { RevisionFrame } from '../../../features/parts/components/revision-head.tsx';
import { paths } from '../../../lib/paths.ts';

export function Component() {
  const { revisionId = '' } = useParams();
  return (
    <RevisionFrame revisionId={revisionId}>
      {(revision) => (
        <>
          <ReleasePanel revision={revision} />
          <DrawingPanel revision={revision} />
          <Characteristics revision={revision} />
        </>
      )}
    </RevisionFrame>
  );
}

function Characteristics({ revision }: { revision: RevisionResponse }) {
  const { data } = useSuspenseQuery(characteristicsQuery(revision.id));
  const { edit } = revision.abilities;
  const exportPath = `/api/revisions/${revision.id}/characteristics/export`;
  return (
    <section className="flex flex-col gap-2">
      <div className="flex flex-wrap items-center justify-between gap-2">
        <h2>Characteristics</h2>
        <div className="no-print flex flex-wrap gap-2">
          {edit && (
            <LinkButton to={paths.characteristicImport(revision.partId, revision.id)} size="small">
              Import a table
            </LinkButton>
          )}
          {edit && (
            <DownloadLink href="/api/characteristic-template?format=xlsx" size="small">
              Template
            </DownloadLink>
          )}
          {data.items.length > 0 && (
            <>
              <DownloadLink href={`${exportPath}?format=csv`} size="small">
                Export CSV
              </DownloadLink>
              <DownloadLink href={`${exportPath}?format=xlsx`} size="small">
                Export XLSX
              </DownloadLink>
            </>
          )}
        </div>
      </div>
      {edit || data.items.length > 0 ? (
        <CharacteristicsTable
          key={revision.state}
          revisionId={revision.id}
          items={data.items}
          editable={edit}
        />
      ) : (
        <EmptyState title="No characteristics">
          This revision was released before any were entered.
        </EmptyState>
      )}
    </section>
  );
}
