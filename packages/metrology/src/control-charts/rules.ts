/**
 * The run rules, one name each. Numbers of Nelson (Journal of Quality Technology 16 (1984) 237-239) in brackets;
 * Western Electric (Statistical Quality Control Handbook, 1956) uses 1, 5, 6 and eight in place of nine on one side.
 */
export type RunRule =
  | 'beyond-three-sigma'
  | 'nine-on-one-side'
  | 'eight-on-one-side'
  | 'six-in-trend'
  | 'fourteen-alternating'
  | 'two-of-three-beyond-two-sigma'
  | 'four-of-five-beyond-one-sigma'
  | 'fifteen-within-one-sigma'
  | 'eight-outside-one-sigma';

/** What each rule looks for, in words a chart can print. */
export const RULE_STATEMENTS: Readonly<Record<RunRule, string>> = {
  'beyond-three-sigma': 'one point beyond a control limit (3 sigma)',
  'nine-on-one-side': 'nine points in a row on one side of the centre line',
  'eight-on-one-side': 'eight points in a row on one side of the centre line',
  'six-in-trend': 'six points in a row, each above the one before, or each below it',
  'fourteen-alternating': 'fourteen points in a row, alternately up and down',
  'two-of-three-beyond-two-sigma': 'two of three points in a row beyond 2 sigma on one side',
  'four-of-five-beyond-one-sigma': 'four of five points in a row beyond 1 sigma on one side',
  'fifteen-within-one-sigma': 'fifteen points in a row within 1 sigma of the centre line',
  'eight-outside-one-sigma':
    'eight points in a row with none within 1 sigma, on both sides of the centre line',
};

/** Nelson's tests 1 to 8, in his order. */
export const NELSON_RULES: readonly RunRule[] = [
  'beyond-three-sigma',
  'nine-on-one-side',
  'six-in-trend',
  'fourteen-alternating',
  'two-of-three-beyond-two-sigma',
  'four-of-five-beyond-one-sigma',
  'fifteen-within-one-sigma',
  'eight-outside-one-sigma',
];

/** The four tests for instability of the Western Electric handbook. */
export const WESTERN_ELECTRIC_RULES: readonly RunRule[] = [
  'beyond-three-sigma',
  'two-of-three-beyond-two-sigma',
  'four-of-five-beyond-one-sigma',
  'eight-on-one-side',
];

/** How many points each rule looks back over, the newest included. */
export const RULE_WINDOW: Readonly<Record<RunRule, number>> = {
  'beyond-three-sigma': 1,
  'nine-on-one-side': 9,
  'eight-on-one-side': 8,
  'six-in-trend': 6,
  'fourteen-alternating': 14,
  'two-of-three-beyond-two-sigma': 3,
  'four-of-five-beyond-one-sigma': 5,
  'fifteen-within-one-sigma': 15,
  'eight-outside-one-sigma': 8,
};
