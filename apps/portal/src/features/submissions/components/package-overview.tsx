import type { SubmissionResponse } from '@trammel/shared/submissions';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { SafetyCaution } from '../../../components/package/caution.tsx';
import { SignaturePair } from '../../../components/package/signature-pair.tsx';
import { DownloadLink, LinkButton } from '../../../components/ui/link-button.tsx';
import { countOf, showBytes } from '../../../lib/format.ts';
import { paths } from '../../../lib/paths.ts';
import { fileAddress } from '../api.ts';
import { whatComesNext } from '../next-step.ts';
import { FindingTally, RowTally } from './finding-tally.tsx';
import { decisionRuleWords, roundingWords } from '../words.ts';

/** `acts` are the deeds on the request that this person may do now. */
export function PackageOverview({ submission, acts }: { submission: SubmissionResponse; acts: ReactNode }) {
  const next = whatComesNext(submission);
  const supplier = submission.side === 'supplier';
  const seen = supplier || submission.submittedAt !== null;
  const { counts, revision } = submission;
  return (
    <div className="flex flex-col gap-6">
      <section
        aria-labelledby="next"
        className="border border-l-4 border-rule border-l-marking bg-sheet px-4 py-3"
      >
        <h2 id="next">{next.title}</h2>
        <p className="max-w-prose text-pencil">{next.text}</p>
        <div className="no-print mt-2 flex flex-wrap gap-2">
          {next.link && (
            <LinkButton to={next.link.to} weight="primary">
              {next.link.label}
            </LinkButton>
          )}
          {acts}
        </div>
      </section>

      {submission.part.safetyOrRegulatory && <SafetyCaution balloons={[]} />}

      <div className="grid gap-6 lg:grid-cols-2">
        <section aria-labelledby="standing">
          <h2 id="standing" className="mb-2">
            Where it stands
          </h2>
          <Facts
            facts={[
              [
                'Characteristics',
                countOf(counts.characteristics, 'row on the drawing', 'rows on the drawing'),
              ],
              [
                'Measured',
                `${counts.rows - counts.unmeasured} of ${countOf(counts.rows, 'row', 'rows')}, each stream on its own`,
              ],
              ['Special', countOf(counts.special, 'characteristic', 'characteristics')],
              ...(seen
                ? ([
                    ['Stands out', <RowTally key="rows" {...counts} special={0} />],
                    ['Findings', <FindingTally key="findings" {...submission.findings} />],
                  ] as [string, ReactNode][])
                : ([['Results', 'With the supplier until the warrant is signed']] as [string, ReactNode][])),
              ...(submission.submittedAt === null
                ? []
                : ([
                    [
                      'Marked',
                      `${counts.marked} of ${countOf(counts.characteristics, 'characteristic', 'characteristics')} by the reviewer`,
                    ],
                  ] as [string, ReactNode][])),
            ]}
          />
        </section>
        <section aria-labelledby="asked">
          <h2 id="asked" className="mb-2">
            What was asked
          </h2>
          <Facts
            facts={[
              [
                'Request',
                <Link key="request" to={paths.request(submission.requestId)}>
                  Request {submission.requestNumber} and its thread
                </Link>,
              ],
              [
                'Sample',
                `${countOf(submission.piecesPerStream, 'piece', 'pieces')} from each ${submission.streamKind === 'other' ? 'stream' : submission.streamKind}`,
              ],
              ['Decision rule', decisionRuleWords(submission.decisionRule)],
              ['Rounding', roundingWords[submission.roundingRule]],
              [
                'Drawing',
                revision.drawing ? (
                  <span key="drawing" className="flex flex-wrap items-center gap-2">
                    <span className="break-all">
                      {revision.drawing.name} ({showBytes(revision.drawing.size)})
                    </span>
                    <DownloadLink size="small" href={fileAddress(revision.drawing.id)}>
                      Download
                    </DownloadLink>
                  </span>
                ) : (
                  'none'
                ),
              ],
            ]}
          />
        </section>
      </div>

      <SignaturePair
        warrant={{
          signature: submission.warrantSignature,
          unsigned: supplier
            ? 'A person of your organisation with the authority to sign submits the package by signing here.'
            : `Signed by ${submission.supplier.name} when the package is complete.`,
        }}
        disposition={{
          signature: submission.dispositionSignature,
          unsigned: supplier
            ? `Signed by ${submission.customer.name} after review.`
            : 'Signed by a reviewer with the authority to sign, after every row is marked.',
        }}
      />
    </div>
  );
}

function Facts({ facts }: { facts: readonly [string, ReactNode][] }) {
  return (
    <dl className="grid grid-cols-[auto_minmax(0,1fr)] border border-rule bg-sheet">
      {facts.map(([name, value], index) => (
        <div key={name} className={index === 0 ? 'contents' : 'contents [&>*]:border-t [&>*]:border-rule'}>
          <dt className="px-3 py-1.5 text-pencil">{name}</dt>
          <dd className="px-3 py-1.5 break-words">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
