/**
 * Standard tolerances of ISO 286-1:2010 Table 1 for nominal sizes up to 500 mm, in tenths of a micrometre.
 *
 * They are tabulated because the standard's own rounding cannot be computed from the factor i: 23 entries differ from
 * the formula by more than 3 %. From IT12 each is ten times the grade five before it, the standard's own rule, so those
 * rows are not kept. Checked entry by entry against a second transcription (reference case iso286-it-grades).
 */

/** Upper ends of the size ranges in millimetres; a range is over the one before, up to and including its own. */
export const SIZE_RANGES = [3, 6, 10, 18, 30, 50, 80, 120, 180, 250, 315, 400, 500] as const;

/** Tolerance in 0.1 µm by grade and size range, IT01 to IT11. */
export const STANDARD_TOLERANCES: Readonly<Record<string, readonly number[]>> = {
  '01': [3, 4, 4, 5, 6, 6, 8, 10, 12, 20, 25, 30, 40],
  '0': [5, 6, 6, 8, 10, 10, 12, 15, 20, 30, 40, 50, 60],
  '1': [8, 10, 10, 12, 15, 15, 20, 25, 35, 45, 60, 70, 80],
  '2': [12, 15, 15, 20, 25, 25, 30, 40, 50, 70, 80, 90, 100],
  '3': [20, 25, 25, 30, 40, 40, 50, 60, 80, 100, 120, 130, 150],
  '4': [30, 40, 40, 50, 60, 70, 80, 100, 120, 140, 160, 180, 200],
  '5': [40, 50, 60, 80, 90, 110, 130, 150, 180, 200, 230, 250, 270],
  '6': [60, 80, 90, 110, 130, 160, 190, 220, 250, 290, 320, 360, 400],
  '7': [100, 120, 150, 180, 210, 250, 300, 350, 400, 460, 520, 570, 630],
  '8': [140, 180, 220, 270, 330, 390, 460, 540, 630, 720, 810, 890, 970],
  '9': [250, 300, 360, 430, 520, 620, 740, 870, 1000, 1150, 1300, 1400, 1550],
  '10': [400, 480, 580, 700, 840, 1000, 1200, 1400, 1600, 1850, 2100, 2300, 2500],
  '11': [600, 750, 900, 1100, 1300, 1600, 1900, 2200, 2500, 2900, 3200, 3600, 4000],
};

/**
 * Multipliers of the standard tolerance factor i = 0.45·∛D + 0.001·D (µm, D in mm) for IT5 to IT18, and the linear
 * forms of IT01 to IT1 (constant and slope), ISO 286-1:2010 annex A. Kept to check the table, not to make it.
 */
export const GRADE_MULTIPLIERS: Readonly<Record<string, number>> = {
  '5': 7,
  '6': 10,
  '7': 16,
  '8': 25,
  '9': 40,
  '10': 64,
  '11': 100,
  '12': 160,
  '13': 250,
  '14': 400,
  '15': 640,
  '16': 1000,
  '17': 1600,
  '18': 2500,
};

/** IT01, IT0 and IT1 as constant + slope·D in µm, D in mm (ISO 286-1:2010 annex A). */
export const FINE_GRADE_LINES: Readonly<Record<string, readonly [number, number]>> = {
  '01': [0.3, 0.008],
  '0': [0.5, 0.012],
  '1': [0.8, 0.02],
};
