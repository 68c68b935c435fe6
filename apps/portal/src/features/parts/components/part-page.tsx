import { useSuspenseQuery } from '@tanstack/react-query';
import type { RevisionSummary } from '@trammel/shared/parts';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { TitleBlock } from '../../../components/package/title-block.tsx';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { LinkButton } from '../../../components/ui/link-button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { paths } from '../../../lib/paths.ts';
import { useMay } from '../../../lib/session.ts';
import { partQuery } from '../api.ts';
import { NextRevisionDialog } from './next-revision-dialog.tsx';
import { PartDialog } from './part-dialog.tsx';
import { RevisionState } from './revision-state.tsx';

export function PartPage({ partId }: { partId: string }) {
  const { data: part } = useSuspenseQuery(partQuery(partId));
  const [open, setOpen] = useState<'change' | 'next' | null>(null);
  const navigate = useNavigate();
  const mayWrite = useMay('part:write');
  const draft = part.revisions.find((revision) => revision.state === 'draft');
  const released = part.revisions.find((revision) => revision.state === 'released');
  const [newest, before] = part.revisions;

  const columns: DataColumn<RevisionSummary>[] = [
    { id: 'code', header: 'Revision', cell: (row) => <span className="figures">{row.code}</span> },
    { id: 'state', header: 'State', cell: (row) => <RevisionState state={row.state} /> },
    {
      id: 'characteristics',
      header: 'Characteristics',
      align: 'end',
      cell: (row) => <span className="figures">{row.characteristicCount}</span>,
    },
    {
      id: 'drawing',
      header: 'Drawing',
      cell: (row) => (row.hasDrawing ? 'attached' : <span className="text-pencil">missing</span>),
    },
    {
      id: 'released',
      header: 'Released',
      cell: (row) =>
        row.releasedAt ? <Moment at={row.releasedAt} /> : <span className="text-pencil">not yet</span>,
    },
  ];

  return (
    <div className="flex flex-col gap-4">
      <title>{`${part.number} · Trammel`}</title>
      <TitleBlock
        isPageHead
        partNumber={part.number}
        revision={released?.code ?? draft?.code ?? ''}
        description={part.name}
        material={part.material}
        units={part.unitSystem}
        state={released ? <RevisionState state="released" /> : <RevisionState state="draft" />}
      />
      {part.safetyOrRegulatory && (
        <Notice tone="attention" title="Safety or regulatory part">
          An approval here records a decision by an authorised person. It does not replace the design
          authority&apos;s approval, the law or the customer&apos;s own requirements.
        </Notice>
      )}
      <section className="flex flex-col gap-2">
        <div className="flex flex-wrap items-center justify-between gap-2">
          <h2>Drawing revisions</h2>
          <div className="flex flex-wrap gap-2">
            {newest && before && (
              <LinkButton to={paths.comparison(part.id, newest.id, before.id)}>
                Compare {before.code} with {newest.code}
              </LinkButton>
            )}
            {mayWrite && <Button onClick={() => setOpen('change')}>Change the part</Button>}
            {mayWrite && !draft && (
              <Button weight="primary" onClick={() => setOpen('next')}>
                Next revision
              </Button>
            )}
          </div>
        </div>
        <DataTable
          caption={`Revisions of ${part.number}`}
          columns={columns}
          rows={part.revisions}
          rowId={(row) => row.id}
          rowHref={(row) => paths.revision(part.id, row.id)}
          empty={null}
        />
        {draft && mayWrite && (
          <p className="text-pencil">
            Revision {draft.code} is a draft. Open it to attach the drawing and enter the characteristics; the
            next revision can start once it is released.
          </p>
        )}
      </section>
      {open === 'change' && (
        <PartDialog part={part} onClose={() => setOpen(null)} onSaved={() => setOpen(null)} />
      )}
      {open === 'next' && (
        <NextRevisionDialog
          part={part}
          onClose={() => setOpen(null)}
          onCreated={(revision) => void navigate(paths.revision(part.id, revision.id))}
        />
      )}
    </div>
  );
}
