import { useSuspenseQuery } from '@tanstack/react-query';
import { TitleBlock } from '../../../components/package/title-block.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { PackageStateBadge } from '../../../components/ui/state-badge.tsx';
import { DueDay } from '../../../components/ui/time.tsx';
import { requestQuery } from '../api.ts';
import { requestStateWords } from '../words.ts';
import { DraftEditor } from './draft-editor.tsx';
import { RequestView } from './request-view.tsx';

export function RequestPage({ requestId }: { requestId: string }) {
  const { data: request } = useSuspenseQuery(requestQuery(requestId));
  const last = request.rounds.at(-1);
  const settled = request.state !== 'issued' || !['requested', 'in-preparation'].includes(last?.state ?? '');
  return (
    <div className="flex flex-col gap-5">
      <title>{`Request ${request.number}, ${request.part.number} · Trammel`}</title>
      <TitleBlock
        isPageHead
        partNumber={request.part.number}
        revision={request.revision.code}
        description={request.part.name}
        customer={request.customer.name}
        supplier={request.supplier.name}
        site={request.site.name}
        level={request.level}
        request={request.number}
        due={<DueDay on={request.dueOn} settled={settled} />}
        state={last ? <PackageStateBadge state={last.state} /> : requestStateWords[request.state]}
      />
      {request.revision.superseded && request.state !== 'withdrawn' && (
        <Notice tone="attention" title={`Revision ${request.revision.code} is superseded by a newer drawing`}>
          An approval on this revision never counts for the newer one.
        </Notice>
      )}
      {request.abilities.edit ? (
        <DraftEditor key={request.id} request={request} />
      ) : (
        <RequestView request={request} />
      )}
    </div>
  );
}
