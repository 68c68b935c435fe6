/**
 * General tolerances of ISO 2768-1:1989 Tables 1 to 3, each value ±. Ranges are over the lower end, up to and
 * including the upper; the first linear and radius range starts at 0.5 mm inclusive. null: the standard gives none.
 * Typed from knowledge of the standard; reference case iso2768-1-tables. Part 2 (geometry, H/K/L) is withdrawn.
 */

/** Tolerance classes: fine, medium, coarse, very coarse. */
export type GeneralClass = 'f' | 'm' | 'c' | 'v';

/** Upper ends in millimetres of the ranges for linear sizes (Table 1). */
export const LINEAR_RANGES = ['3', '6', '30', '120', '400', '1000', '2000', '4000'] as const;

/** ± mm for linear sizes, broken edges excepted (Table 1). */
export const LINEAR_TOLERANCES: Readonly<Record<GeneralClass, readonly (string | null)[]>> = {
  f: ['0.05', '0.05', '0.1', '0.15', '0.2', '0.3', '0.5', null],
  m: ['0.1', '0.1', '0.2', '0.3', '0.5', '0.8', '1.2', '2'],
  c: ['0.2', '0.3', '0.5', '0.8', '1.2', '2', '3', '4'],
  v: [null, '0.5', '1', '1.5', '2.5', '4', '6', '8'],
};

/** Upper ends in millimetres of the ranges for external radii and chamfer heights (Table 2); null: no end. */
export const RADIUS_RANGES = ['3', '6', null] as const;

/** ± mm for external radii and chamfer heights (Table 2). */
export const RADIUS_TOLERANCES: Readonly<Record<GeneralClass, readonly string[]>> = {
  f: ['0.2', '0.5', '1'],
  m: ['0.2', '0.5', '1'],
  c: ['0.4', '1', '2'],
  v: ['0.4', '1', '2'],
};

/** Upper ends in millimetres of the ranges of the shorter leg of an angle (Table 3); null: no end. */
export const ANGLE_RANGES = ['10', '50', '120', '400', null] as const;

/** ± minutes of arc for angles by the shorter leg (Table 3). */
export const ANGLE_TOLERANCES: Readonly<Record<GeneralClass, readonly string[]>> = {
  f: ['60', '30', '20', '10', '5'],
  m: ['60', '30', '20', '10', '5'],
  c: ['90', '60', '30', '15', '10'],
  v: ['180', '120', '60', '30', '20'],
};
