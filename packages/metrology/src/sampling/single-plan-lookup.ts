import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import {
  CODE_LETTERS,
  INSPECTION_LEVELS,
  LARGEST_LOTS,
  LETTERS_BY_LEVEL,
  REDUCED_SAMPLE_SIZES,
  SAMPLE_SIZES,
} from '../tables/iso2859-code-letters.ts';
import type { CodeLetter, InspectionLevel } from '../tables/iso2859-code-letters.ts';
import {
  AQL_VALUES,
  LAST_LETTER_OF_LONG_ROWS,
  SINGLE_PLAN_RULES,
  TIGHTENED_LETTER_S,
  ZERO_DIAGONAL_OFFSET,
} from '../tables/iso2859-single-plans.ts';
import type { Cell, DiagonalRule } from '../tables/iso2859-single-plans.ts';

export type InspectionSeverity = keyof typeof SINGLE_PLAN_RULES;

export interface LotRequest {
  readonly lotSize: number;
  readonly level: InspectionLevel;
  /** Acceptance quality limit: per cent nonconforming up to 10, nonconformities per 100 units for all values. */
  readonly aql: number;
  readonly severity: InspectionSeverity;
}

export interface LookedUpPlan {
  readonly method: string;
  readonly inputs: LotRequest;
  /** Letter that lot size and level give. */
  readonly codeLetter: CodeLetter;
  /** Letter whose plan is used after the arrows; S exists in the tightened table only. */
  readonly planLetter: CodeLetter | 'S';
  readonly arrow: 'none' | 'up' | 'down';
  /** Sample size of the table, which may exceed the lot. */
  readonly sampleSize: number;
  readonly acceptanceNumber: number;
  readonly rejectionNumber: number;
  /** True when the sample size reaches the lot size: then every piece is inspected. */
  readonly inspectAll: boolean;
  readonly piecesToInspect: number;
  /** Whether the table entry was compared with a public transcription or is from memory. */
  readonly certainty: 'transcribed' | 'from-memory';
}

/**
 * Sample size code letter for a lot size and an inspection level (ISO 2859-1:1999 table 1).
 * @param lotSize pieces in the lot, whole, at least 2 (a lot of one piece has no sampling plan)
 * @param level general level I, II (the usual one) or III, or special level S1 to S4
 */
export function codeLetter(lotSize: number, level: InspectionLevel): CodeLetter | Undetermined {
  if (!Number.isInteger(lotSize) || lotSize < 2) {
    return undetermined('lot-size', `The lot size must be a whole number of at least 2, not ${lotSize}`);
  }
  if (!INSPECTION_LEVELS.includes(level)) {
    return undetermined(
      'inspection-level',
      `Inspection level ${level} is not one of ${INSPECTION_LEVELS.join(', ')}`,
    );
  }
  const row = LARGEST_LOTS.findIndex((largest) => lotSize <= largest);
  return LETTERS_BY_LEVEL[level].charAt(row) as CodeLetter;
}

/** The cell of a master table: an acceptance number or the way to the next plan. Letters and AQL by their places from 0. */
function cellAt(rule: DiagonalRule, letter: number, aql: number): Cell {
  const diagonal = letter + aql - ZERO_DIAGONAL_OFFSET;
  if (diagonal < 0) return 'down';
  const cells = letter <= LAST_LETTER_OF_LONG_ROWS ? [...rule.cells, ...rule.longRowCells] : rule.cells;
  const cell = cells[diagonal] ?? 'up';
  if (letter === 0 && typeof cell === 'string') return 'down';
  // In the tightened table the plan of letter A at AQL 10 is an arrow: 2 pieces with 0 accepted would tighten nothing.
  if (rule === SINGLE_PLAN_RULES.tightened && letter === 0 && diagonal === 1) return 'down';
  return letter === CODE_LETTERS.length - 1 && cell === 'down' ? 'up' : cell;
}

function certaintyOf(severity: InspectionSeverity, aql: number, letter: string): LookedUpPlan['certainty'] {
  if (severity === 'normal') return 'transcribed';
  if (severity === 'reduced') return 'from-memory';
  return aql >= 0.65 && aql <= 15 && letter <= 'L' ? 'transcribed' : 'from-memory';
}

/**
 * Single sampling plan by attributes from lot size, level, AQL and severity: ISO 2859-1:1999 tables 1 and 2-A, 2-B, 2-C (the plans of
 * ANSI/ASQ Z1.4 for normal and tightened inspection). Arrows are followed, and the sample size is then that of the letter reached, as the
 * standard says. Accept with at most `acceptanceNumber` nonconforming pieces in the sample.
 *
 * Edges: a sample as large as the lot means every piece is inspected; a lot under 2, an AQL that is not one of the preferred values, or a part
 * of the reduced table that is not sure (AQL above 10) is undetermined. The answer says for each entry how sure it is. Z1.4 leaves a gap
 * between acceptance and rejection number under reduced inspection; the ISO edition of 1999 does not, and this function follows ISO.
 * Tested against the reference cases iso2859-code-letters and iso2859-single-normal.
 */
export function singleSamplingPlan(request: LotRequest): LookedUpPlan | Undetermined {
  const { lotSize, level, aql, severity } = request;
  const letter = codeLetter(lotSize, level);
  if (typeof letter !== 'string') return letter;
  const aqlPlace = AQL_VALUES.findIndex((value) => value === aql);
  if (aqlPlace < 0) {
    return undetermined('aql', `AQL ${aql} is not one of the preferred values ${AQL_VALUES.join(', ')}`);
  }
  const rule: DiagonalRule = SINGLE_PLAN_RULES[severity];
  if (aql > rule.largestAql) {
    return undetermined(
      'outside-table',
      `The ${severity} table is held only up to AQL ${rule.largestAql}; take the plan from the standard`,
    );
  }
  const start = CODE_LETTERS.indexOf(letter);
  const direction = cellAt(rule, start, aqlPlace);
  let place = start;
  let cell: Cell = direction;
  while (typeof cell === 'string') {
    if (severity === 'tightened' && place === CODE_LETTERS.length - 1 && aql === TIGHTENED_LETTER_S.aql) {
      return answer(
        request,
        letter,
        'S',
        'down',
        TIGHTENED_LETTER_S.sampleSize,
        TIGHTENED_LETTER_S.acceptanceNumber,
      );
    }
    place += direction === 'up' ? -1 : 1;
    cell = cellAt(rule, place, aqlPlace);
  }
  const reached = CODE_LETTERS[place] as CodeLetter;
  const sizes = severity === 'reduced' ? REDUCED_SAMPLE_SIZES : SAMPLE_SIZES;
  return answer(
    request,
    letter,
    reached,
    place === start ? 'none' : (direction as 'up' | 'down'),
    sizes[reached],
    cell,
  );
}

function answer(
  request: LotRequest,
  letter: CodeLetter,
  planLetter: CodeLetter | 'S',
  arrow: LookedUpPlan['arrow'],
  sampleSize: number,
  acceptanceNumber: number,
): LookedUpPlan {
  const table = { normal: '2-A', tightened: '2-B', reduced: '2-C' }[request.severity];
  return {
    method: `ISO 2859-1:1999 tables 1 and ${table}, single sampling, ${request.severity} inspection`,
    inputs: request,
    codeLetter: letter,
    planLetter,
    arrow,
    sampleSize,
    acceptanceNumber,
    rejectionNumber: acceptanceNumber + 1,
    inspectAll: sampleSize >= request.lotSize,
    piecesToInspect: Math.min(sampleSize, request.lotSize),
    certainty: certaintyOf(request.severity, request.aql, planLetter),
  };
}
