import { fUpperTail } from '../distributions/f.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { componentIntervals } from './component-intervals.ts';
import type { ComponentIntervals } from './component-intervals.ts';
import { sizeOfCrossed } from './crossed-readings.ts';
import type { CrossedReadings, StudySize } from './crossed-readings.ts';
import { crossedSquares } from './crossed-squares.ts';
import { varianceShares } from './variance-shares.ts';
import type { GaugeShares, StudyOptions } from './variance-shares.ts';

export interface AnovaRow {
  readonly sumOfSquares: number;
  readonly degreesOfFreedom: number;
  readonly meanSquare: number;
  /** missing for the error row, and where the denominator is 0 */
  readonly f?: number;
  readonly p?: number;
}

export interface AnovaTable {
  readonly appraiser: AnovaRow;
  readonly part: AnovaRow;
  /** missing when the interaction was pooled into the error */
  readonly interaction?: AnovaRow;
  readonly error: AnovaRow;
  readonly total: { readonly sumOfSquares: number; readonly degreesOfFreedom: number };
}

export interface GaugeAnovaOptions extends StudyOptions {
  /** `by-rule` (default): pooled when its p value is above `alphaToPool`; or always kept, or always pooled. */
  readonly interaction?: 'by-rule' | 'keep' | 'pool';
  /** Default 0.25 (AIAG's printed example pools on the same side; common practice). */
  readonly alphaToPool?: number;
  /** Two-sided confidence of the component intervals, default 0.95. */
  readonly confidence?: number;
}

export interface GaugeAnova extends GaugeShares {
  readonly method: string;
  readonly n: number;
  readonly inputs: StudySize & { readonly alphaToPool: number; readonly confidence: number };
  readonly mean: number;
  /** the table the components come from */
  readonly table: AnovaTable;
  readonly pooled: boolean;
  /** p value of the interaction; undetermined without repeated trials */
  readonly interactionP: number | Undetermined;
  /** components before negative ones were set to 0 */
  readonly componentsBeforeClipping: {
    readonly repeatability: number;
    readonly appraiser: number;
    readonly interaction: number;
    readonly part: number;
  };
  readonly intervals: ComponentIntervals | Undetermined;
}

/**
 * Gauge repeatability and reproducibility by analysis of variance, parts and appraisers crossed and both random
 * (AIAG, Measurement Systems Analysis, 4th ed. 2010, ch. III-B and appendix A; Burdick, Borror, Montgomery, J. Qual. Technol. 35, 2003).
 *
 * With interaction, p parts, o appraisers, r trials: s2_e = MS_e; s2_po = (MS_po - MS_e)/r; s2_o = (MS_o - MS_po)/(p r);
 * s2_p = (MS_p - MS_po)/(o r); the F of appraiser and part is their mean square over MS_po, as both factors are random. (The manual's printed
 * 34.44 and 213.52 divide by MS_e.) Pooled: MS_po and MS_e join as one error, which takes their place everywhere.
 * Rule: pooled when the p value of the interaction is above `alphaToPool`. Without repeated trials the additive model is the only one.
 *
 * Negative components are set to 0; what they were is in `componentsBeforeClipping`. Undetermined: fewer than two appraisers (use
 * `singleAppraiserStudy`), an unbalanced block, no variation. Tested against the reference case grr-aiag-anova.
 */
export function gaugeAnova(
  readings: CrossedReadings,
  options: GaugeAnovaOptions = {},
): GaugeAnova | Undetermined {
  const size = sizeOfCrossed(readings);
  if ('undetermined' in size) return size;
  const { parts, appraisers, trials } = size;
  if (appraisers < 2) return undetermined('too-few', 'The crossed analysis needs at least two appraisers');
  const alphaToPool = options.alphaToPool ?? 0.25;
  const confidence = options.confidence ?? 0.95;
  const squares = crossedSquares(readings, size);
  const interactionDegrees = (parts - 1) * (appraisers - 1);
  const errorDegrees = parts * appraisers * (trials - 1);

  const interaction = row(squares.interaction, interactionDegrees);
  const error = row(squares.error, errorDegrees);
  const tested = trials > 1 ? against(interaction, error) : interaction;
  const interactionP =
    tested.p ?? undetermined('no-repeats', 'The interaction cannot be tested without varying repeats');
  const pooled =
    trials === 1 ||
    options.interaction === 'pool' ||
    (options.interaction !== 'keep' && typeof interactionP === 'number' && interactionP > alphaToPool);

  const usedError = pooled
    ? row(squares.interaction + squares.error, interactionDegrees + errorDegrees)
    : error;
  const denominator = pooled ? usedError : interaction;
  const table: AnovaTable = {
    appraiser: against(row(squares.appraiser, appraisers - 1), denominator),
    part: against(row(squares.part, parts - 1), denominator),
    ...(pooled ? {} : { interaction: tested }),
    error: usedError,
    total: { sumOfSquares: squares.total, degreesOfFreedom: size.n - 1 },
  };
  const componentsBeforeClipping = {
    repeatability: usedError.meanSquare,
    appraiser: (table.appraiser.meanSquare - denominator.meanSquare) / (parts * trials),
    interaction: pooled ? 0 : (interaction.meanSquare - error.meanSquare) / trials,
    part: (table.part.meanSquare - denominator.meanSquare) / (appraisers * trials),
  };
  const shares = varianceShares(
    {
      repeatability: componentsBeforeClipping.repeatability,
      appraiser: Math.max(0, componentsBeforeClipping.appraiser),
      interaction: Math.max(0, componentsBeforeClipping.interaction),
      part: Math.max(0, componentsBeforeClipping.part),
    },
    squares.mean,
    options,
  );
  if ('undetermined' in shares) return shares;
  return {
    method: `analysis of variance, crossed, ${pooled ? 'interaction pooled into the error' : 'with interaction'}`,
    n: size.n,
    inputs: { ...size, alphaToPool, confidence },
    ...shares,
    mean: squares.mean,
    table,
    pooled,
    interactionP,
    componentsBeforeClipping,
    intervals: componentIntervals(table, size, confidence),
  };
}

function row(sumOfSquares: number, degreesOfFreedom: number): AnovaRow {
  return {
    sumOfSquares,
    degreesOfFreedom,
    meanSquare: degreesOfFreedom > 0 ? sumOfSquares / degreesOfFreedom : 0,
  };
}

/** Adds the F ratio and its upper tail; both stay away when the denominator is 0. */
function against(source: AnovaRow, denominator: AnovaRow): AnovaRow {
  if (!(denominator.meanSquare > 0)) return source;
  const f = source.meanSquare / denominator.meanSquare;
  return { ...source, f, p: fUpperTail(f, source.degreesOfFreedom, denominator.degreesOfFreedom) };
}
