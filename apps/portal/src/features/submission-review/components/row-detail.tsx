import { useMemo, type ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { CheckedRow } from '@trammel/shared/checks';
import type { PieceResponse, RowResult, StreamResponse } from '@trammel/shared/measurements';
import type { ReviewRow } from '@trammel/shared/submission-review';
import { Beam } from '../../../components/charts/beam.tsx';
import { CapabilityCaution, SafetyCaution } from '../../../components/package/caution.tsx';
import { Figure } from '../../../components/ui/figure.tsx';
import { WeightBadge } from '../../../components/ui/state-badge.tsx';
import { VerdictMark } from '../../../components/ui/verdict-mark.tsx';
import { showComputed } from '../../../lib/format.ts';
import { beamOf, limitsInWords } from '../review-beam.ts';

interface RowDetailProps {
  row: ReviewRow;
  streams: readonly StreamResponse[];
  pieces: readonly PieceResponse[];
  deviationsHref: string;
  decision: ReactNode;
}

/** Everything the reviewer needs on one characteristic: each stream by itself, findings, deviations, and the decision. */
export function RowDetail({ row, streams, pieces, deviationsHref, decision }: RowDetailProps) {
  const { characteristic: facts } = row;
  const hasIndex = row.checked.some((checked) => checked.index !== null);
  return (
    <section
      aria-label={`Balloon ${facts.balloon}`}
      className="flex min-w-0 flex-col gap-3 border border-rule bg-sheet p-3"
    >
      <header className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h2>
          <span className="figures">{facts.balloon}</span> {facts.description}
        </h2>
        <span className="figures text-pencil">{limitsInWords(facts)}</span>
        {facts.class !== 'none' && (
          <span className="border border-brass px-1.5 text-brass">{facts.class.replace('-', ' or ')}</span>
        )}
        <VerdictMark verdict={row.verdict} />
      </header>
      <p className="caption">
        {[facts.sheet && `sheet ${facts.sheet}`, facts.zone && `zone ${facts.zone}`, facts.method]
          .filter(Boolean)
          .join(', ')}
      </p>
      {facts.class === 'safety-regulatory' && <SafetyCaution />}
      <div className="flex flex-col divide-y divide-rule border-t border-rule">
        {streams.map((stream) => (
          <StreamResult
            key={stream.id}
            row={row}
            stream={stream}
            labels={pieces.filter((piece) => piece.streamId === stream.id).map((piece) => piece.label)}
            result={row.results.find((result) => result.streamId === stream.id)}
            checked={row.checked.find((checked) => checked.streamId === stream.id)}
          />
        ))}
      </div>
      {hasIndex && <CapabilityCaution stable={false} />}
      {row.findings.length > 0 && (
        <ul className="flex flex-col gap-1">
          {row.findings.map((finding) => (
            <li key={finding.key} className="flex flex-wrap items-baseline gap-x-2">
              <WeightBadge weight={finding.weight} />
              <span className="font-semibold">{finding.title}.</span>
              <span className="min-w-0">{finding.detail}</span>
            </li>
          ))}
        </ul>
      )}
      {row.deviations.map((deviation) => (
        <p key={deviation.id}>
          <Link to={deviationsHref}>Deviation {deviation.number}</Link>,{' '}
          {deviation.state === 'sent' ? 'not decided yet' : deviation.state}:{' '}
          {deviation.rangeLower ?? deviation.lowerLimit ?? '…'} to{' '}
          {deviation.rangeUpper ?? deviation.upperLimit ?? '…'} {deviation.unit}. {deviation.cause}
        </p>
      ))}
      {decision}
    </section>
  );
}

interface StreamResultProps {
  row: ReviewRow;
  stream: StreamResponse;
  labels: readonly string[];
  result: RowResult | undefined;
  checked: CheckedRow | undefined;
}

function StreamResult({ row, stream, labels, result, checked }: StreamResultProps) {
  const { characteristic: facts } = row;
  const beam = useMemo(() => (result ? beamOf(facts, [result]) : null), [facts, result]);
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-1 py-2">
      <div className="w-28">
        <p className="font-medium">{stream.name}</p>
        {stream.blocked ? (
          <p className="text-vermilion">blocked</p>
        ) : (
          <VerdictMark verdict={checked?.verdict ?? 'not-measured'} />
        )}
      </div>
      {beam && <Beam name={`Balloon ${facts.balloon}, ${stream.name}`} className="w-60" {...beam} />}
      {checked && checked.mean !== null && <Figures checked={checked} decimals={facts.decimals} />}
      {result && (
        <ol
          className="figures flex w-full flex-wrap gap-x-3 text-[12px]"
          aria-label={`Readings, ${stream.name}`}
        >
          {result.readings.slice(0, 60).map((text, place) => (
            <li
              key={labels[place] ?? place}
              className={
                result.marks.charAt(place) === 'o'
                  ? 'text-vermilion'
                  : result.marks.charAt(place) === 'u'
                    ? 'text-plum'
                    : 'text-pencil'
              }
            >
              {text ?? '–'}
              {result.marks.charAt(place) === 'o' && <span className="sr-only"> out of tolerance</span>}
              {result.marks.charAt(place) === 'o' && <span aria-hidden="true">◆</span>}
            </li>
          ))}
          {result.readings.length > 60 && (
            <li className="text-pencil">and {result.readings.length - 60} more</li>
          )}
        </ol>
      )}
      {result?.note && <p className="w-full whitespace-pre-line">Note of the supplier: {result.note}</p>}
      {checked?.indexReason && <p className="caption w-full">{checked.indexReason}</p>}
      {checked && checked.rounded.length > 0 && (
        <p className="caption w-full">
          Judged after rounding (ASTM E29):{' '}
          {checked.rounded
            .slice(0, 6)
            .map((pair) => `${pair.raw} as ${pair.rounded}`)
            .join(', ')}
        </p>
      )}
    </div>
  );
}

function Figures({ checked, decimals }: { checked: CheckedRow; decimals: number }) {
  const { n, mean, standardDeviation: s, index } = checked;
  const name = (what: string) => `${what} of balloon ${checked.balloon}, ${checked.stream}`;
  return (
    <dl className="flex flex-wrap gap-x-4">
      <Captioned caption="n">{String(n)}</Captioned>
      {mean !== null && (
        <Captioned caption="mean">
          <Figure
            value={showComputed(mean, decimals + 1)}
            name={name('Mean')}
            formula="sum of the readings / n"
            n={n}
            standard="ISO 3534-1"
          />
        </Captioned>
      )}
      {s !== null && (
        <Captioned caption="s">
          <Figure
            value={showComputed(s, decimals + 2)}
            name={name('Standard deviation')}
            formula="√(Σ(x − mean)² / (n − 1))"
            n={n}
            standard="ISO 3534-1"
          />
        </Captioned>
      )}
      {index && (
        <Captioned caption={index.name}>
          <Figure
            value={showComputed(index.value, 2)}
            name={name(index.name)}
            formula="min((upper − mean), (mean − lower)) / 3 s"
            inputs={
              index.lowerBound === null
                ? []
                : [{ name: 'one-sided 95 % lower bound', value: showComputed(index.lowerBound, 2) }]
            }
            n={index.n}
            standard="ISO 22514-2, overall spread"
            caution="Stability was not shown by these pieces."
          />
        </Captioned>
      )}
    </dl>
  );
}

function Captioned({ caption, children }: { caption: string; children: ReactNode }) {
  return (
    <div className="flex flex-col">
      <dt className="caption">{caption}</dt>
      <dd className="figures">{children}</dd>
    </div>
  );
}
