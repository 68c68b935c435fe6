/**
 * Code letters and sample sizes of attribute inspection: ISO 2859-1:1999 table 1 and the left columns of tables 2-A, 2-B, 2-C
 * (the same figures as ANSI/ASQ Z1.4-2008 and MIL-STD-105E tables I and II-A to II-C). Whole numbers, read in two public
 * transcriptions that agree; the reduced sample sizes are from memory.
 */
export const CODE_LETTERS = [
  'A',
  'B',
  'C',
  'D',
  'E',
  'F',
  'G',
  'H',
  'J',
  'K',
  'L',
  'M',
  'N',
  'P',
  'Q',
  'R',
] as const;

export type CodeLetter = (typeof CODE_LETTERS)[number];

/** General levels I to III and special levels S1 to S4. */
export const INSPECTION_LEVELS = ['S1', 'S2', 'S3', 'S4', 'I', 'II', 'III'] as const;

export type InspectionLevel = (typeof INSPECTION_LEVELS)[number];

/** Largest lot of each row of the table; the last row has no upper end. Lots start at 2 pieces. */
export const LARGEST_LOTS = [
  8,
  15,
  25,
  50,
  90,
  150,
  280,
  500,
  1200,
  3200,
  10_000,
  35_000,
  150_000,
  500_000,
  Infinity,
] as const;

/** One letter per row of `LARGEST_LOTS`. */
export const LETTERS_BY_LEVEL: Readonly<Record<InspectionLevel, string>> = {
  S1: 'AAAABBBBCCCCDDD',
  S2: 'AAABBBCCCDDDEEE',
  S3: 'AABBCCDDEEFFGGH',
  S4: 'AABCCDEEFGGHJJK',
  I: 'AABCCDEFGHJKLMN',
  II: 'ABCDEFGHJKLMNPQ',
  III: 'BCDEFGHJKLMNPQR',
};

/** Sample size per code letter for normal and tightened inspection; letter S (3150) exists in the tightened table only. */
export const SAMPLE_SIZES: Readonly<Record<CodeLetter, number>> = {
  A: 2,
  B: 3,
  C: 5,
  D: 8,
  E: 13,
  F: 20,
  G: 32,
  H: 50,
  J: 80,
  K: 125,
  L: 200,
  M: 315,
  N: 500,
  P: 800,
  Q: 1250,
  R: 2000,
};

/** Sample size per code letter for reduced inspection. From memory. */
export const REDUCED_SAMPLE_SIZES: Readonly<Record<CodeLetter, number>> = {
  A: 2,
  B: 2,
  C: 2,
  D: 3,
  E: 5,
  F: 8,
  G: 13,
  H: 20,
  J: 32,
  K: 50,
  L: 80,
  M: 125,
  N: 200,
  P: 315,
  Q: 500,
  R: 800,
};
