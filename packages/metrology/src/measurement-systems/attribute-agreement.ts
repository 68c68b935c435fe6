import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { cohenKappa, fleissKappa } from './kappa.ts';
import type { FleissKappa, Kappa } from './kappa.ts';
import { exactProportion } from '../capability/proportion-interval.ts';
import type { Proportion } from '../capability/proportion-interval.ts';

export type Decision = 'accept' | 'reject';

/** Decisions of an attribute study: `decisions[part][appraiser][trial]`, with what each part really is. */
export interface AttributeStudy {
  readonly decisions: readonly (readonly (readonly Decision[])[])[];
  readonly reference: readonly Decision[];
}

export type AttributeVerdict = 'acceptable' | 'marginal' | 'not-acceptable';

export interface AppraiserAgreement {
  /** parts this appraiser judged alike in every trial */
  readonly repeated: Proportion | Undetermined;
  /** parts judged rightly in every trial */
  readonly effectiveness: Proportion | Undetermined;
  /** bad parts accepted, of all decisions on bad parts */
  readonly missRate: Proportion | Undetermined;
  /** good parts refused, of all decisions on good parts */
  readonly falseAlarmRate: Proportion | Undetermined;
  readonly kappaToReference: Kappa | Undetermined;
  readonly verdict: AttributeVerdict;
}

export interface AttributeAgreement {
  readonly method: string;
  readonly n: number;
  readonly inputs: {
    readonly parts: number;
    readonly appraisers: number;
    readonly trials: number;
    readonly confidence: number;
  };
  readonly appraisers: readonly AppraiserAgreement[];
  /** trial by trial, for each pair of appraisers, counted from 0 */
  readonly pairs: readonly {
    readonly first: number;
    readonly second: number;
    readonly kappa: Kappa | Undetermined;
  }[];
  /** all decisions on a part taken as raters */
  readonly amongAll: FleissKappa | Undetermined;
  /** parts on which every appraiser was right in every trial */
  readonly systemEffectiveness: Proportion | Undetermined;
  /** the worst verdict of any appraiser */
  readonly verdict: AttributeVerdict;
}

/** Common practice (AIAG, Measurement Systems Analysis, 4th ed. 2010, ch. III-C; from memory): [acceptable to, marginal to]. */
export const ATTRIBUTE_BANDS = {
  effectiveness: { acceptable: 0.9, marginal: 0.8 },
  missRate: { acceptable: 0.02, marginal: 0.05 },
  falseAlarmRate: { acceptable: 0.05, marginal: 0.1 },
} as const;

/**
 * Agreement of appraisers with themselves, with each other and with the truth, for go/no-go gauges and visual checks.
 *
 * Effectiveness counts parts (right in every trial), miss and false-alarm rates count decisions, as the trade does; each share carries exact
 * limits. Cohen's kappa compares an appraiser with the reference and two appraisers trial by trial; Fleiss' kappa takes all of them together.
 * Verdict per appraiser: the worst of the three bands of `ATTRIBUTE_BANDS`; a rate without opportunity does not count.
 * Undetermined: no parts, an unbalanced study, or a reference of another length.
 */
export function attributeAgreement(
  study: AttributeStudy,
  confidence = 0.95,
): AttributeAgreement | Undetermined {
  const { decisions, reference } = study;
  const parts = decisions.length;
  const appraisers = decisions[0]?.length ?? 0;
  const trials = decisions[0]?.[0]?.length ?? 0;
  if (parts < 1 || appraisers < 1 || trials < 1)
    return undetermined('too-few', 'The study holds no decisions');
  if (reference.length !== parts)
    return undetermined('reference', `The study has ${parts} parts but ${reference.length} reference values`);
  if (!(confidence > 0 && confidence < 1))
    return undetermined('confidence', 'The confidence must lie between 0 and 1');
  for (const [part, row] of decisions.entries()) {
    if (row.length !== appraisers || row.some((cell) => cell.length !== trials)) {
      return undetermined(
        'unbalanced',
        `Part ${part + 1} does not have ${trials} decisions by each of ${appraisers} appraisers`,
      );
    }
  }
  const judged = Array.from({ length: appraisers }, (_, appraiser) =>
    judgeAppraiser(study, appraiser, confidence),
  );
  const pairs = judged.flatMap((_, first) =>
    judged.slice(first + 1).map((__, offset) => {
      const second = first + 1 + offset;
      const votes = decisions.flatMap((row) =>
        (row[first] ?? []).map((decision, trial): [Decision, Decision] => [
          decision,
          row[second]?.[trial] ?? decision,
        ]),
      );
      return { first, second, kappa: cohenKappa(crossTable(votes), confidence) };
    }),
  );
  const allRight = decisions.filter((row, part) =>
    row.flat().every((decision) => decision === reference[part]),
  ).length;
  const verdicts = judged.map((appraiser) => appraiser.verdict);
  return {
    method: 'attribute agreement: exact limits for shares, Cohen and Fleiss kappa',
    n: parts * appraisers * trials,
    inputs: { parts, appraisers, trials, confidence },
    appraisers: judged,
    pairs,
    amongAll: fleissKappa(
      decisions.map((row) => {
        const accepted = row.flat().filter((decision) => decision === 'accept').length;
        return [accepted, appraisers * trials - accepted];
      }),
      confidence,
    ),
    systemEffectiveness: exactProportion(allRight, parts, confidence),
    verdict: worst(verdicts),
  };
}

function judgeAppraiser(study: AttributeStudy, appraiser: number, confidence: number): AppraiserAgreement {
  const byPart = study.decisions.map((row, part) => ({
    decisions: row[appraiser] ?? [],
    truth: study.reference[part] ?? 'accept',
  }));
  const votes = byPart.flatMap(({ decisions, truth }) =>
    decisions.map((decision): [Decision, Decision] => [decision, truth]),
  );
  const onBad = votes.filter(([, truth]) => truth === 'reject');
  const onGood = votes.filter(([, truth]) => truth === 'accept');
  const right = byPart.filter(({ decisions, truth }) =>
    decisions.every((decision) => decision === truth),
  ).length;
  const alike = byPart.filter(({ decisions }) =>
    decisions.every((decision) => decision === decisions[0]),
  ).length;
  const effectiveness = exactProportion(right, byPart.length, confidence);
  const missRate = exactProportion(
    onBad.filter(([decision]) => decision === 'accept').length,
    onBad.length,
    confidence,
  );
  const falseAlarmRate = exactProportion(
    onGood.filter(([decision]) => decision === 'reject').length,
    onGood.length,
    confidence,
  );
  return {
    repeated: exactProportion(alike, byPart.length, confidence),
    effectiveness,
    missRate,
    falseAlarmRate,
    kappaToReference: cohenKappa(crossTable(votes), confidence),
    verdict: worst([
      isUndetermined(effectiveness)
        ? 'acceptable'
        : bandOf(
            1 - effectiveness.share,
            1 - ATTRIBUTE_BANDS.effectiveness.acceptable,
            1 - ATTRIBUTE_BANDS.effectiveness.marginal,
          ),
      rateVerdict(missRate, ATTRIBUTE_BANDS.missRate),
      rateVerdict(falseAlarmRate, ATTRIBUTE_BANDS.falseAlarmRate),
    ]),
  };
}

function rateVerdict(
  rate: Proportion | Undetermined,
  band: { acceptable: number; marginal: number },
): AttributeVerdict {
  return isUndetermined(rate) ? 'acceptable' : bandOf(rate.share, band.acceptable, band.marginal);
}

/** A share exactly on a bound belongs to the better band; the hair keeps 1 - 0.9 from missing 0.1 by its last bit. */
function bandOf(share: number, acceptable: number, marginal: number): AttributeVerdict {
  const hair = 1e-12;
  if (share <= acceptable + hair) return 'acceptable';
  return share <= marginal + hair ? 'marginal' : 'not-acceptable';
}

function worst(verdicts: readonly AttributeVerdict[]): AttributeVerdict {
  const order: readonly AttributeVerdict[] = ['not-acceptable', 'marginal', 'acceptable'];
  return order.find((word) => verdicts.includes(word)) ?? 'acceptable';
}

function crossTable(votes: readonly (readonly [Decision, Decision])[]): number[][] {
  const count = (row: Decision, column: Decision): number =>
    votes.filter(([a, b]) => a === row && b === column).length;
  return [
    [count('reject', 'reject'), count('reject', 'accept')],
    [count('accept', 'reject'), count('accept', 'accept')],
  ];
}
