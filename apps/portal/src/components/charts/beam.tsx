import { memo } from 'react';
import { frame, layOutBeam } from './beam-geometry.ts';
import {
  arrowsPath,
  attributeMarks,
  bracketPath,
  diamondsPath,
  dotsPath,
  halvesPath,
  hatchPath,
  limitsPath,
  mostAttributeMarks,
} from './beam-paths.ts';
import { beamInWords, type BeamWordsData } from './beam-words.ts';

export interface BeamProps extends BeamWordsData {
  /** Tailwind width class; the drawing keeps its proportions. */
  className?: string;
  /** The row already says it in words: hide the drawing from screen readers. */
  decorative?: boolean;
}

/** One characteristic as one beam. All beams share the frame, so that a column of them is read as one picture. */
export const Beam = memo(function Beam({ className = 'w-60', decorative = false, ...data }: BeamProps) {
  return (
    <svg
      viewBox={`0 0 ${frame.width} ${frame.height}`}
      className={`block max-w-full ${className}`}
      {...(decorative ? { 'aria-hidden': true } : { role: 'img', 'aria-label': beamInWords(data) })}
    >
      {data.attribute ? <AttributeMarks {...data.attribute} /> : <MeasuredBeam {...data} />}
    </svg>
  );
});

function MeasuredBeam(data: BeamWordsData) {
  const beam = layOutBeam(data);
  const y = frame.line;
  const open = beam.lowerPoint === null && beam.upperPoint === null;
  return (
    <>
      <path
        d={`M${beam.from} ${y}H${beam.to}`}
        className="stroke-pencil"
        strokeDasharray={open ? '3 3' : undefined}
      />
      {beam.guards.length > 0 && <path d={hatchPath(beam.guards)} className="fill-none stroke-plum" />}
      {beam.nominal !== null && (
        <path d={`M${beam.nominal} ${y - 8}v16`} className="stroke-marking" strokeWidth={1.5} />
      )}
      <path d={limitsPath([beam.lowerPoint, beam.upperPoint])} className="fill-brass" />
      {beam.bracket && <path d={bracketPath(beam.bracket)} className="fill-none stroke-graphite" />}
      {beam.unjudged.length > 0 && (
        <path d={dotsPath(beam.unjudged, 2.5)} className="fill-sheet stroke-pencil" strokeWidth={1.2} />
      )}
      {beam.inside.length > 0 && <path d={dotsPath(beam.inside)} className="fill-verdigris" />}
      {beam.undecided.length > 0 && (
        <>
          <path
            d={dotsPath(beam.undecided, frame.dot + 0.5)}
            className="fill-sheet stroke-plum"
            strokeWidth={1.2}
          />
          <path d={halvesPath(beam.undecided)} className="fill-plum" />
        </>
      )}
      {beam.outside.length > 0 && (
        <>
          <path d={diamondsPath(beam.outside)} className="fill-vermilion" />
          {beam.outside.some((mark) => mark.beyond !== null) && (
            <path d={arrowsPath(beam.outside)} className="fill-none stroke-vermilion" strokeWidth={1.5} />
          )}
        </>
      )}
      {beam.unmeasured > 0 && <Unmeasured count={beam.unmeasured} />}
    </>
  );
}

/** Pieces that nobody measured have no place on the scale: they wait at the foot of the drawing. */
function Unmeasured({ count }: { count: number }) {
  return (
    <>
      <path d={dotsPath([5], 3.2, 22)} className="fill-none stroke-pencil" strokeDasharray="2 1.4" />
      {count > 1 && (
        <text x={11} y={25.5} className="fill-pencil font-mono text-[9px]">
          {count}
        </text>
      )}
    </>
  );
}

function AttributeMarks({ checked, failed }: { checked: number; failed: number }) {
  if (checked > mostAttributeMarks) {
    return (
      <>
        <path d={dotsPath([frame.edge])} className="fill-verdigris" />
        <text x={frame.edge + 8} y={15} className="fill-graphite font-mono text-[11px]">
          {checked - failed}
        </text>
        {failed > 0 && (
          <>
            <path d={diamondsPath([{ x: 92 }])} className="fill-vermilion" />
            <text x={102} y={15} className="fill-graphite font-mono text-[11px]">
              {failed}
            </text>
          </>
        )}
      </>
    );
  }
  const marks = attributeMarks(checked, failed);
  return (
    <>
      <path d={dotsPath(marks.passed)} className="fill-verdigris" />
      {failed > 0 && <path d={diamondsPath(marks.failed)} className="fill-vermilion" />}
    </>
  );
}
