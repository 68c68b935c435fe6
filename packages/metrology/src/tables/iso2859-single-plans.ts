/**
 * The master tables of single sampling, ISO 2859-1:1999 tables 2-A (normal), 2-B (tightened) and 2-C (reduced), held as their rule.
 *
 * Sample sizes and AQL values climb in the same steps (about the fifth root of ten), so a plan depends only on its diagonal
 * d = (place of the letter) + (place of the AQL) - 14, where A and 0.010 stand at place 0. An arrow says which way to go for the next plan.
 *
 * How sure. Normal: letters, acceptance numbers and arrows agree with two public transcriptions of the table. Tightened: agrees with a public
 * transcription of MIL-STD-105E table II-B for AQL 0.65 to 15 and letters A to L; above AQL 15 (27 and 41) and letter S from memory.
 * Reduced: from memory, the 1999 edition (no gap between acceptance and rejection number), kept to AQL 10 and below where the rows are regular.
 */
export const AQL_VALUES = [
  0.01, 0.015, 0.025, 0.04, 0.065, 0.1, 0.15, 0.25, 0.4, 0.65, 1, 1.5, 2.5, 4, 6.5, 10, 15, 25, 40, 65, 100,
  150, 250, 400, 650, 1000,
] as const;

/** The diagonal of code letter A at AQL 6.5, where acceptance number 0 stands in the normal table. */
export const ZERO_DIAGONAL_OFFSET = 14;

/** Letters A to E carry two more acceptance numbers, for AQL values above 100. */
export const LAST_LETTER_OF_LONG_ROWS = 4;

/** A number is an acceptance number; the rejection number is one more. */
export type Cell = number | 'up' | 'down';

export interface DiagonalRule {
  /** Cells from diagonal 0 upwards; below 0 every cell points down, past the end every cell points up. */
  readonly cells: readonly Cell[];
  /** Further cells for letters A to E. */
  readonly longRowCells: readonly Cell[];
  /** Largest AQL this rule is sure of. */
  readonly largestAql: number;
}

export const SINGLE_PLAN_RULES = {
  normal: { cells: [0, 'up', 'down', 1, 2, 3, 5, 7, 10, 14, 21], longRowCells: [30, 44], largestAql: 1000 },
  tightened: {
    cells: ['down', 0, 'down', 'down', 1, 2, 3, 5, 8, 12, 18],
    longRowCells: [27, 41],
    largestAql: 1000,
  },
  reduced: { cells: [0, 'up', 'down', 1, 2, 3, 5, 6, 8, 10], longRowCells: [], largestAql: 10 },
} as const satisfies Record<string, DiagonalRule>;

/** The one plan of the tightened table that has a letter of its own. */
export const TIGHTENED_LETTER_S = { sampleSize: 3150, acceptanceNumber: 1, aql: 0.025 } as const;
