import type { ProcessState } from '../control-charts/verdict.ts';
import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { normalSpread, relateSpreadToBand } from './band-relation.ts';
import type { BandRelation } from './band-relation.ts';
import { limitsFault } from './capability-limits.ts';
import type { CapabilityLimits } from './capability-limits.ts';
import { BOUNDED_FAMILIES, compareFits, UNBOUNDED_FAMILIES } from './fits/fit-distribution.ts';
import type { FitComparison } from './fits/fit-distribution.ts';
import { judgeFit } from './fits/fit-quality.ts';
import type { FitQuality } from './fits/fit-quality.ts';
import type { Family } from './fits/fitted-model.ts';
import { fitNormal } from './fits/normal-fits.ts';
import { observedFractionOutside } from './fraction-outside.ts';
import type { ObservedOutside } from './fraction-outside.ts';
import { indexGate, INITIAL_STUDY_REQUIREMENT } from './index-gate.ts';
import type { GateWord, IndexRequirement } from './index-gate.ts';
import { minimumInterval, minimumLowerBound, potentialInterval } from './index-intervals.ts';
import type { BoundMethod, IndexInterval, LowerBound } from './index-intervals.ts';
import { momentsOf } from './moments.ts';
import type { Moments } from './moments.ts';
import { normalIndices } from './normal-indices.ts';
import type { NormalIndices } from './normal-indices.ts';
import { percentileIndices } from './percentile-indices.ts';
import type { PercentileIndices } from './percentile-indices.ts';
import { movingRangeSpread, withinSpread } from './spread-estimates.ts';
import type { SpreadEstimate, WithinMethod } from './spread-estimates.ts';

/** What the control chart of the same readings said: the verdict of a chart fits in as it is. */
export interface ControlFinding {
  readonly state: ProcessState;
  readonly reasons?: readonly string[];
}

/** Which distribution the gated index rests on. `fitted` compares candidates; a list names them; `normal` is the ordinary formula. */
export type DistributionChoice = 'normal' | 'fitted' | readonly Family[];

export interface CapabilityStudyRequest {
  /** readings of one stream, in production order */
  readonly values: readonly number[];
  readonly limits: CapabilityLimits;
  /** what the chart showed; without it no index is called capability */
  readonly control?: ControlFinding;
  /** readings per subgroup, successive; 1 (default) for single readings */
  readonly subgroupSize?: number;
  /** default: mean range for subgroups, moving range for single readings */
  readonly withinMethod?: WithinMethod;
  /** default: `fitted` when there is a natural bound, else `normal` */
  readonly distribution?: DistributionChoice;
  readonly requirement?: IndexRequirement;
  /** agreed smallest number of readings, default 100 */
  readonly minimumReadings?: number;
  readonly confidence?: number;
  readonly boundMethod?: BoundMethod;
}

/** `met`, `reviewer-decides`, `not-met` need control shown and enough readings; the other words say which of the two is missing. */
export type StudyDecision = GateWord | 'unstable' | 'control-not-shown' | 'too-few';

export interface CapabilityStudy {
  readonly method: string;
  readonly n: number;
  readonly inputs: {
    readonly limits: CapabilityLimits;
    readonly subgroupSize: number;
    readonly minimumReadings: number;
    readonly confidence: number;
    readonly requirement: IndexRequirement;
  };
  readonly moments: Moments;
  /** Cp, Cpk from the spread within subgroups, normal formula */
  readonly within: NormalIndices | Undetermined;
  readonly withinSpread: SpreadEstimate | Undetermined;
  /** Pp, Ppk from all readings, normal formula: shown even where a fitted distribution counts */
  readonly overall: NormalIndices;
  /** the percentile method, where a distribution was asked for */
  readonly fitted: PercentileIndices | Undetermined;
  readonly comparison: FitComparison | Undetermined;
  readonly normality: FitQuality;
  /** the index that is gated, and where it comes from */
  readonly index: number;
  readonly indexBasis: 'normal formula' | 'fitted distribution';
  readonly potentialInterval: IndexInterval | Undetermined;
  readonly indexInterval: IndexInterval | Undetermined;
  /** one-sided; for a fitted distribution the normal form is only a guide and the method says so */
  readonly lowerBound: LowerBound | Undetermined;
  readonly observedOutside: ObservedOutside;
  readonly relation: BandRelation | Undetermined;
  readonly decision: StudyDecision;
  /** true only when control was shown: otherwise the index describes these readings and predicts nothing */
  readonly isCapability: boolean;
  readonly reasons: readonly string[];
}

/**
 * The whole study of one stream: both spreads, both sets of indices, fitted distribution where the characteristic has a natural bound, limits of
 * confidence, fraction outside, relation of the natural spread to the band, and the decision.
 *
 * Decision, in this order: chart not in control - `unstable`; fewer readings than agreed - `too-few` (never met, whatever the index);
 * no chart, or too few points on it - `control-not-shown`; else `indexGate` of the overall index. The overall index (Ppk) is gated because it
 * holds what the process did, drift included; Cpk beside it shows what it could do.
 * Undetermined: unusable limits, fewer than two readings, all alike, not finite, or a fitted index that was asked for and does not exist.
 */
export function capabilityStudy(request: CapabilityStudyRequest): CapabilityStudy | Undetermined {
  const { values, limits, control, subgroupSize = 1, confidence = 0.95, minimumReadings = 100 } = request;
  const requirement = request.requirement ?? INITIAL_STUDY_REQUIREMENT;
  const fault = limitsFault(limits);
  if (fault) return fault;
  if (!Number.isInteger(subgroupSize) || subgroupSize < 1) {
    return undetermined('subgroup-size', 'The subgroup size must be a whole number of at least 1');
  }
  if (!(confidence > 0 && confidence < 1))
    return undetermined('confidence', 'The confidence must lie between 0 and 1');
  const moments = momentsOf(values);
  if (isUndetermined(moments)) return moments;
  const overall = normalIndices(moments.mean, moments.deviation, limits, 'overall');
  const observedOutside = observedFractionOutside(values, limits, confidence);
  const normal = fitNormal(values);
  if (isUndetermined(overall)) return overall;
  if (isUndetermined(observedOutside)) return observedOutside;
  if (isUndetermined(normal)) return normal;

  const spread = spreadOf(request, subgroupSize);
  const bounded = limits.naturalLower !== undefined;
  const choice = request.distribution ?? (bounded ? 'fitted' : 'normal');
  const comparison = comparisonFor(choice, values, limits);
  const fitted = isUndetermined(comparison) ? comparison : chosenIndices(comparison, limits);
  if (choice !== 'normal' && isUndetermined(fitted)) return fitted;
  const usesFit = !isUndetermined(fitted);
  const index = usesFit ? fitted.minimum : overall.minimum;
  const bound = minimumLowerBound(index, moments.n, { confidence, method: request.boundMethod });
  const reasons: string[] = [];
  const decision = decide(request, index, requirement, minimumReadings, reasons);
  if (usesFit && !isUndetermined(comparison) && comparison.allRejected) {
    reasons.push('No distribution describes these readings: every fit is rejected at 5 %');
  }
  const potential = usesFit ? fitted.potential : overall.potential;
  return {
    method: usesFit ? `${fitted.method}; ${overall.method} beside it` : overall.method,
    n: moments.n,
    inputs: { limits, subgroupSize, minimumReadings, confidence, requirement },
    moments,
    within: isUndetermined(spread) ? spread : normalIndices(moments.mean, spread.sigma, limits, 'within'),
    withinSpread: spread,
    overall,
    fitted,
    comparison,
    normality: judgeFit(normal, values),
    index,
    indexBasis: usesFit ? 'fitted distribution' : 'normal formula',
    potentialInterval: isUndetermined(potential)
      ? potential
      : potentialInterval(potential, moments.n, { confidence }),
    indexInterval: minimumInterval(index, moments.n, { confidence }),
    lowerBound:
      usesFit && !isUndetermined(bound)
        ? { ...bound, method: `${bound.method}, a guide for fitted data` }
        : bound,
    observedOutside,
    relation: relateSpreadToBand(
      usesFit
        ? { low: fitted.x0135, centre: fitted.median, high: fitted.x99865 }
        : normalSpread(moments.mean, moments.deviation),
      limits,
      requirement.refuseBelow,
    ),
    decision,
    isCapability: control?.state === 'in-control',
    reasons,
  };
}

function decide(
  request: CapabilityStudyRequest,
  index: number,
  requirement: IndexRequirement,
  minimumReadings: number,
  reasons: string[],
): StudyDecision {
  const n = request.values.length;
  const state = request.control?.state;
  const word = indexGate(index, requirement);
  if (state === 'not-in-control')
    reasons.push(...(request.control?.reasons ?? ['The chart shows points or runs out of control']));
  if (n < minimumReadings) reasons.push(`${n} readings where ${minimumReadings} were agreed`);
  if (state === undefined) reasons.push('No control chart was judged for these readings');
  if (state === 'too-few') reasons.push('The chart has too few points to show control');
  if (word !== 'met')
    reasons.push(
      word === 'not-met'
        ? `Index below ${requirement.refuseBelow}`
        : `Index not above ${requirement.acceptAbove}`,
    );
  if (state === 'not-in-control') return 'unstable';
  if (n < minimumReadings) return 'too-few';
  return state === 'in-control' ? word : 'control-not-shown';
}

function spreadOf(request: CapabilityStudyRequest, subgroupSize: number): SpreadEstimate | Undetermined {
  const method = request.withinMethod ?? (subgroupSize > 1 ? 'mean-range' : 'moving-range');
  if (method === 'moving-range') return movingRangeSpread(request.values);
  const subgroups: number[][] = [];
  for (let start = 0; start < request.values.length; start += subgroupSize) {
    subgroups.push(request.values.slice(start, start + subgroupSize));
  }
  return withinSpread(subgroups, method);
}

function comparisonFor(
  choice: DistributionChoice,
  values: readonly number[],
  limits: CapabilityLimits,
): FitComparison | Undetermined {
  if (choice === 'normal')
    return undetermined('not-asked', 'The ordinary formula was asked for, so no distribution was fitted');
  const bounded = limits.naturalLower !== undefined;
  const families = choice === 'fitted' ? (bounded ? BOUNDED_FAMILIES : UNBOUNDED_FAMILIES) : choice;
  return compareFits(values, families, limits.naturalLower ?? 0);
}

function chosenIndices(
  comparison: FitComparison,
  limits: CapabilityLimits,
): PercentileIndices | Undetermined {
  if (comparison.chosen) return percentileIndices(comparison.chosen.model, limits);
  return comparison.failed[0]?.why ?? undetermined('no-fit', 'No distribution was named to fit');
}
