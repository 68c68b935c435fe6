import type { RequestResponse } from '@trammel/shared/requests';
import type { ReactNode } from 'react';
import { LinkButton } from '../../../components/ui/link-button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { PackageStateBadge } from '../../../components/ui/state-badge.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { countOf } from '../../../lib/format.ts';
import { paths } from '../../../lib/paths.ts';
import { demandWords, levelWords, reasonWords, ruleWords } from '../words.ts';
import { RequestActs } from './request-acts.tsx';
import { RequestThread } from './request-thread.tsx';

/** An issued or withdrawn request as both sides read it. */
export function RequestView({ request }: { request: RequestResponse }) {
  const last = request.rounds.at(-1);
  return (
    <div className="flex flex-col gap-6">
      {request.withdrawnReason !== null && (
        <Notice tone="attention" title="This request is withdrawn">
          {request.withdrawnReason}
        </Notice>
      )}
      {request.message !== '' && (
        <blockquote className="max-w-prose border-l-2 border-marking pl-4 break-words whitespace-pre-line">
          {request.message}
        </blockquote>
      )}
      <div className="no-print flex flex-wrap items-start gap-2">
        {last && request.state === 'issued' && last.state !== 'requested' && (
          <LinkButton to={paths.submission(last.id)} weight="primary">
            Open the package
          </LinkButton>
        )}
        <RequestActs requestId={request.id} />
      </div>
      <div className="grid gap-6 lg:grid-cols-2">
        <section aria-labelledby="asked">
          <h2 id="asked" className="mb-2">
            What is asked
          </h2>
          <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-4 gap-y-1">
            <Fact name="Reason">
              {reasonWords[request.reason]}
              {request.reasonNote !== '' && `: ${request.reasonNote}`}
            </Fact>
            <Fact name="Level">
              {request.level}: {levelWords[request.level]}
            </Fact>
            <Fact name="Streams">{request.streams.join(', ')}</Fact>
            <Fact name="Sample">{countOf(request.piecesPerStream, 'piece', 'pieces')} from each stream</Fact>
            <Fact name="Decision rule">{ruleWords(request.decisionRule)}</Fact>
            <Fact name="Purchase order">{request.purchaseOrder || '—'}</Fact>
            <Fact name="Reviewers">{request.reviewers.map((one) => one.name).join(', ')}</Fact>
            <Fact name="Issued">{request.issuedAt ? <Moment at={request.issuedAt} /> : '—'}</Fact>
            <Fact name="Acknowledged">
              {request.acknowledgedAt ? (
                <>
                  {request.acknowledgedBy}, <Moment at={request.acknowledgedAt} />
                </>
              ) : (
                'not yet'
              )}
            </Fact>
            <Fact name="Rounds">
              {request.rounds.length === 0
                ? '—'
                : request.rounds.map((round) => (
                    <span key={round.id} className="mr-3 inline-flex items-center gap-1.5">
                      {round.round}
                      <PackageStateBadge state={round.state} />
                    </span>
                  ))}
            </Fact>
          </dl>
        </section>
        <section aria-labelledby="elements-asked">
          <h2 id="elements-asked" className="mb-2">
            Elements
          </h2>
          <ul className="border border-rule bg-sheet">
            {request.elements
              .filter((element) => element.demand !== 'not-required')
              .map((element) => (
                <li
                  key={element.code}
                  className="flex flex-wrap justify-between gap-x-4 border-rule px-3 py-1 not-first:border-t"
                >
                  <span className="break-words">{element.label}</span>
                  <span className={element.demand === 'submit' ? 'font-semibold' : 'text-pencil'}>
                    {demandWords[element.demand]}
                  </span>
                </li>
              ))}
          </ul>
        </section>
      </div>
      <section aria-labelledby="thread">
        <h2 id="thread" className="mb-2">
          Thread
        </h2>
        <RequestThread request={request} />
      </section>
    </div>
  );
}

function Fact({ name, children }: { name: string; children: ReactNode }) {
  return (
    <>
      <dt className="text-pencil">{name}</dt>
      <dd className="break-words">{children}</dd>
    </>
  );
}
