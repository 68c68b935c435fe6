import { normalUpperQuantile } from '../distributions/normal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

export interface Kappa {
  readonly method: string;
  /** subjects (or pairs of decisions) counted */
  readonly n: number;
  readonly kappa: number;
  /** share of agreement observed */
  readonly observed: number;
  /** share of agreement expected by chance */
  readonly expected: number;
  readonly standardError: number;
  readonly confidence: number;
  readonly lower: number;
  readonly upper: number;
}

export interface FleissKappa extends Kappa {
  readonly raters: number;
  /** agreement within each subject */
  readonly agreementBySubject: readonly number[];
  /** share of all decisions in each category */
  readonly categoryShares: readonly number[];
  /** kappa of each category against all others; undetermined for a category nobody, or everybody, used */
  readonly kappaByCategory: readonly (number | Undetermined)[];
}

/** Common practice in gauge studies (AIAG, Measurement Systems Analysis, 4th ed.): above 0.75 good, below 0.40 poor. */
export function kappaWord(kappa: number): 'good' | 'fair' | 'poor' {
  if (kappa > 0.75) return 'good';
  return kappa < 0.4 ? 'poor' : 'fair';
}

/**
 * Cohen's kappa from a square table of counts, rows by one appraiser, columns by another or by the reference.
 *
 * kappa = (po - pe)/(1 - pe), po = sum p_ii, pe = sum p_i. p_.i. Standard error: the large-sample one that holds for any kappa (Fleiss, Cohen,
 * Everitt, Psychol. Bull. 72, 1969), limits kappa -/+ z SE cut to [-1, 1].
 * Undetermined: a table that is not square, counts that are not whole, no count at all, or chance agreement of 1 (both used one category only).
 * Tested against the reference case msa-attribute-kappa and fixtures made with statsmodels.
 */
export function cohenKappa(table: readonly (readonly number[])[], confidence = 0.95): Kappa | Undetermined {
  const k = table.length;
  if (k < 2 || table.some((row) => row.length !== k))
    return undetermined('table', 'The table must be square with two or more categories');
  if (!table.every((row) => row.every((count) => Number.isInteger(count) && count >= 0))) {
    return undetermined('counts', 'Every count must be a whole number of at least 0');
  }
  if (!(confidence > 0 && confidence < 1))
    return undetermined('confidence', 'The confidence must lie between 0 and 1');
  const n = table.flat().reduce((sum, count) => sum + count, 0);
  if (n === 0) return undetermined('too-few', 'The table holds no decisions');
  const rows = table.map((row) => row.reduce((sum, count) => sum + count, 0) / n);
  const columns = rows.map((_, column) => table.reduce((sum, row) => sum + (row[column] ?? 0), 0) / n);
  const observed = table.reduce((sum, row, place) => sum + (row[place] ?? 0), 0) / n;
  const expected = rows.reduce((sum, share, place) => sum + share * (columns[place] ?? 0), 0);
  if (!(expected < 1))
    return undetermined(
      'one-category',
      'Both used a single category, so agreement by chance cannot be told apart',
    );

  const kappa = (observed - expected) / (1 - expected);
  let squares = 0;
  for (const [i, row] of table.entries()) {
    for (const [j, count] of row.entries()) {
      const share = count / n;
      squares +=
        i === j
          ? share * (1 - expected - ((rows[i] ?? 0) + (columns[i] ?? 0)) * (1 - observed)) ** 2
          : (1 - observed) ** 2 * share * ((columns[i] ?? 0) + (rows[j] ?? 0)) ** 2;
    }
  }
  const variance =
    (squares - (observed * expected - 2 * expected + observed) ** 2) / (n * (1 - expected) ** 4);
  return {
    method: "Cohen's kappa, large-sample standard error",
    n,
    ...limits(kappa, Math.sqrt(Math.max(0, variance)), confidence),
    observed,
    expected,
  };
}

/**
 * Fleiss' kappa from counts: `counts[subject][category]`, every subject judged by the same number of raters.
 *
 * P_i = (sum n_ij^2 - m)/(m (m - 1)); kappa = (mean P_i - sum p_j^2)/(1 - sum p_j^2) (Fleiss, Psychol. Bull. 76, 1971). The limits use the
 * variance that holds for any kappa and takes subjects as the random sample (Gwet, Educ. Psychol. Meas. 81, 2021), not Fleiss' own, which
 * supposes that kappa is 0 and is too narrow elsewhere.
 * Undetermined: fewer than two subjects or raters, unequal numbers of raters, counts not whole, or only one category used.
 * Tested against the reference case fleiss-kappa-14-raters.
 */
export function fleissKappa(
  counts: readonly (readonly number[])[],
  confidence = 0.95,
): FleissKappa | Undetermined {
  const subjects = counts.length;
  const categories = counts[0]?.length ?? 0;
  const raters = counts[0]?.reduce((sum, count) => sum + count, 0) ?? 0;
  if (subjects < 2 || raters < 2 || categories < 2) {
    return undetermined('too-few', "Fleiss' kappa needs two or more subjects, raters and categories");
  }
  for (const [subject, row] of counts.entries()) {
    if (!row.every((count) => Number.isInteger(count) && count >= 0)) {
      return undetermined('counts', 'Every count must be a whole number of at least 0');
    }
    if (row.length !== categories || row.reduce((sum, count) => sum + count, 0) !== raters) {
      return undetermined('unbalanced', `Subject ${subject + 1} was not judged by ${raters} raters`);
    }
  }
  if (!(confidence > 0 && confidence < 1))
    return undetermined('confidence', 'The confidence must lie between 0 and 1');
  const agreementBySubject = counts.map(
    (row) => (row.reduce((sum, count) => sum + count * count, 0) - raters) / (raters * (raters - 1)),
  );
  const categoryShares = Array.from(
    { length: categories },
    (_, category) => counts.reduce((sum, row) => sum + (row[category] ?? 0), 0) / (subjects * raters),
  );
  const observed = agreementBySubject.reduce((sum, agreement) => sum + agreement, 0) / subjects;
  const expected = categoryShares.reduce((sum, share) => sum + share * share, 0);
  if (!(expected < 1))
    return undetermined(
      'one-category',
      'Only one category was used, so agreement by chance cannot be told apart',
    );
  const kappa = (observed - expected) / (1 - expected);
  const influence = counts.map((row, subject) => {
    const chance =
      row.reduce((sum, count, category) => sum + (categoryShares[category] ?? 0) * count, 0) / raters;
    const own = ((agreementBySubject[subject] ?? 0) - expected) / (1 - expected);
    return own - (2 * (1 - kappa) * (chance - expected)) / (1 - expected);
  });
  const variance =
    influence.reduce((sum, value) => sum + (value - kappa) ** 2, 0) / (subjects * (subjects - 1));
  return {
    method: "Fleiss' kappa, Gwet's standard error",
    n: subjects,
    raters,
    ...limits(kappa, Math.sqrt(variance), confidence),
    observed,
    expected,
    agreementBySubject,
    categoryShares,
    kappaByCategory: categoryShares.map((share, category) => {
      if (share === 0 || share === 1)
        return undetermined('category-unused', 'This category was used never or always');
      const mixed = counts.reduce(
        (sum, row) => sum + (row[category] ?? 0) * (raters - (row[category] ?? 0)),
        0,
      );
      return 1 - mixed / (subjects * raters * (raters - 1) * share * (1 - share));
    }),
  };
}

function limits(
  kappa: number,
  standardError: number,
  confidence: number,
): Pick<Kappa, 'kappa' | 'standardError' | 'confidence' | 'lower' | 'upper'> {
  const half = normalUpperQuantile((1 - confidence) / 2) * standardError;
  return {
    kappa,
    standardError,
    confidence,
    lower: Math.max(-1, kappa - half),
    upper: Math.min(1, kappa + half),
  };
}
