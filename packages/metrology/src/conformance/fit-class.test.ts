import { describe, expect, it } from 'vitest';
import { isUndetermined } from '../result.ts';
import { DEVIATION_RANGES, FUNDAMENTAL_DEVIATIONS } from '../tables/iso286-deviations.ts';
import { SIZE_RANGES, STANDARD_TOLERANCES } from '../tables/iso286-grades.ts';
import fits from '../testing/reference/iso286-fits.json' with { type: 'json' };
import formula from '../testing/reference/iso286-it-formula.json' with { type: 'json' };
import grades from '../testing/reference/iso286-it-grades.json' with { type: 'json' };
import errors from '../testing/reference/iso286-transcription-errors.json' with { type: 'json' };
import limits from '../testing/reference/iso286-limits-a.json' with { type: 'json' };
import { fitClassLimits, standardTolerance, standardToleranceFactor } from './fit-class.ts';
import { fit, fitOfLimits } from './fits.ts';

const micrometres = (nominal: string, cls: string) => {
  const found = fitClassLimits(nominal, cls);
  return isUndetermined(found)
    ? found.code
    : [Number(found.upperMicrometres), Number(found.lowerMicrometres)];
};

describe('standard tolerances', () => {
  it.each(Object.entries(grades.expected.IT))(
    '%s equals the published table in all 13 ranges',
    (grade, row) => {
      const found = grades.inputs.ranges_up_to_mm.map((size) => {
        const tolerance = standardTolerance(String(size), grade);
        return isUndetermined(tolerance) ? tolerance.code : Number(tolerance);
      });
      expect(found).toEqual(row);
    },
  );

  it('holds a range over its lower end and up to and including its upper end', () => {
    expect([
      standardTolerance('18', 'IT7'),
      standardTolerance('18.001', 'IT7'),
      standardTolerance('500', '7'),
    ]).toEqual(['18', '21', '63']);
    expect(standardTolerance('500.001', 'IT7')).toMatchObject({ code: 'outside-table' });
    expect(standardTolerance('0', 'IT7')).toMatchObject({ code: 'outside-table' });
    expect(standardTolerance('-5', 'IT7')).toMatchObject({ code: 'outside-table' });
    expect(standardTolerance('25', 'IT19')).toMatchObject({ code: 'class-not-given' });
    expect(standardTolerance('25', 'IT12.5')).toMatchObject({ code: 'class-not-given' });
    expect(standardTolerance('x', 'IT7')).toMatchObject({ code: 'not-a-number' });
  });

  it('is not used in grades 14 to 18 up to 1 mm', () => {
    expect(standardTolerance('1', 'IT14')).toMatchObject({ code: 'class-not-given' });
    expect(standardTolerance('1', 'IT13')).toBe('140');
    expect(standardTolerance('1.001', 'IT14')).toBe('250');
    expect(fitClassLimits('1', 'h14')).toMatchObject({ code: 'class-not-given' });
  });

  it.each(formula.expected.rows)('the factor up to $up_to mm is the formula of annex A', (row) => {
    const found = standardToleranceFactor(String(row.up_to));
    if (isUndetermined(found)) throw new Error(found.reason);
    expect(found.geometricMean / row.D).toBeCloseTo(1, 9);
    expect(found.factor / row.i).toBeCloseTo(1, 9);
    for (const grade of ['IT5', 'IT6', 'IT7', 'IT8', 'IT9', 'IT10', 'IT11'] as const)
      expect((found.grades[grade] ?? NaN) / row[grade]).toBeCloseTo(1, 9);
  });

  it('differs from the formula by more than 3 % exactly where the published list says', () => {
    const listed = formula.published.entries_where_table_differs_from_formula_by_more_than_3_percent;
    const found = SIZE_RANGES.flatMap((up_to) => {
      const factor = standardToleranceFactor(String(up_to));
      if (isUndetermined(factor)) throw new Error(factor.reason);
      return Object.keys(formula.inputs.multipliers).flatMap((grade) => {
        const table = Number(standardTolerance(String(up_to), grade));
        return Math.abs(table / (factor.grades[grade] ?? NaN) - 1) > 0.03 ? [{ up_to, grade, table }] : [];
      });
    });
    expect(found).toEqual(listed.map(({ up_to, grade, table }) => ({ up_to, grade, table })));
  });
});

describe('limits of tolerance classes', () => {
  it.each(limits.expected.rows)('$nominal $cls', ({ nominal, cls, upper_um, lower_um }) => {
    expect(micrometres(String(nominal), cls)).toEqual([upper_um, lower_um]);
  });

  it('writes limits in millimetres with the decimals of the deviations', () => {
    expect(fitClassLimits('25', 'H7')).toMatchObject({
      lower: '25.000',
      upper: '25.021',
      feature: 'hole',
      grade: 'IT7',
      toleranceMicrometres: '21',
    });
    expect(fitClassLimits('25', 'js6')).toMatchObject({
      lower: '24.9935',
      upper: '25.0065',
      upperMicrometres: '6.5',
      feature: 'shaft',
    });
    expect(fitClassLimits('25.000', 'g6')).toMatchObject({
      lower: '24.980',
      upper: '24.993',
      nominal: '25.000',
    });
    expect(fitClassLimits('4', 'js01')).toMatchObject({
      upperMicrometres: '0.2',
      lower: '3.9998',
      upper: '4.0002',
    });
    expect(fitClassLimits('16', 'JS01')).toMatchObject({
      upperMicrometres: '0.25',
      lower: '15.99975',
      upper: '16.00025',
    });
    expect(fitClassLimits('25', ' h5 ')).toMatchObject({ fitClass: 'h5', lower: '24.991', upper: '25.000' });
  });

  it('keeps the exceptions of the standard', () => {
    expect(micrometres('300', 'M6')).toEqual([-9, -41]);
    expect(micrometres('250', 'M6')).toEqual([-8, -37]);
    expect(micrometres('320', 'M6')).toEqual([-10, -46]);
    expect(micrometres('25', 'K8')).toEqual([10, -23]);
    expect(micrometres('25', 'K9')).toBe('class-not-given');
    expect(micrometres('3', 'K9')).toEqual([0, -25]);
    expect(micrometres('1', 'K9')).toBe('class-not-given');
    expect(micrometres('3', 'N9')).toEqual([-4, -29]);
    expect(micrometres('1', 'N9')).toBe('class-not-given');
    expect(micrometres('1', 'N8')).toEqual([-4, -18]);
    expect(micrometres('25', 'M9')).toEqual([-8, -60]);
    expect(micrometres('25', 'P8')).toEqual([-22, -55]);
    expect(micrometres('25', 'N3')).toEqual([-13.5, -17.5]);
    expect(micrometres('25', 'N2')).toBe('class-not-given');
    expect(micrometres('25', 'k8')).toEqual([33, 0]);
    expect(micrometres('25', 'k3')).toEqual([4, 0]);
    expect(micrometres('25', 'k4')).toEqual([8, 2]);
    expect(micrometres('25', 'j7')).toEqual([13, -8]);
    expect(micrometres('25', 'j8')).toBe('class-not-given');
    expect(micrometres('3', 'j8')).toEqual([8, -6]);
    expect(micrometres('25', 'J6')).toEqual([8, -5]);
    expect(micrometres('25', 'J9')).toBe('class-not-given');
    expect(micrometres('1', 'a11')).toBe('class-not-given');
    expect(micrometres('1', 'B11')).toBe('class-not-given');
    expect(micrometres('1', 'c11')).toEqual([-60, -120]);
    expect(micrometres('60', 'ef7')).toBe('class-not-given');
    expect(micrometres('20', 't6')).toBe('class-not-given');
  });

  it('does not share the errors of a widely copied table', () => {
    const { wrong_rows } = errors.expected.findings;
    expect(wrong_rows.m6_upper).toContain('should be 8');
    expect(micrometres('3', 'm6')).toEqual([8, 2]);
    expect(wrong_rows.K7_upper).toContain('should be +3');
    expect(micrometres('5', 'K7')).toEqual([3, -9]);
    expect(wrong_rows.IT1_to_IT4).toContain('IT1 180..200 given 3 (should be 4.5)');
    expect([standardTolerance('190', 'IT1'), standardTolerance('450', 'IT4')]).toEqual(['4.5', '20']);
    expect(wrong_rows.P7_upper).toContain('values of P8');
    expect([micrometres('25', 'P7'), micrometres('25', 'P8')]).toEqual([
      [-14, -35],
      [-22, -55],
    ]);
  });

  it('mirrors the shaft for holes A to H, and lifts by IT(n) − IT(n−1) for K to ZC', () => {
    const letters = Object.keys(FUNDAMENTAL_DEVIATIONS);
    for (const size of DEVIATION_RANGES)
      for (const letter of letters.filter((name) => name < 'j')) {
        const shaft = micrometres(String(size), `${letter}8`);
        const hole = micrometres(String(size), `${letter.toUpperCase()}8`);
        expect(hole).toEqual(Array.isArray(shaft) ? [0 - Number(shaft[1]), 0 - Number(shaft[0])] : shaft);
      }
    for (const size of DEVIATION_RANGES.slice(1))
      for (const letter of letters.filter((name) => name > 'o')) {
        const shaft = fitClassLimits(String(size), `${letter}6`);
        const hole = fitClassLimits(String(size), `${letter.toUpperCase()}7`);
        if (isUndetermined(shaft) || isUndetermined(hole)) continue;
        expect(Number(hole.lowerMicrometres)).toBe(-Number(shaft.upperMicrometres));
      }
  });

  it('puts letters in order: each is further from the nominal than the one before', () => {
    const order = [
      'h',
      'g',
      'fg',
      'f',
      'ef',
      'e',
      'd',
      'cd',
      'c',
      'b',
      'a',
      'k',
      'm',
      'n',
      'p',
      'r',
      's',
      't',
      'u',
      'v',
      'x',
      'y',
      'z',
      'za',
      'zb',
      'zc',
    ];
    expect([...order].sort()).toEqual(Object.keys(FUNDAMENTAL_DEVIATIONS).sort());
    DEVIATION_RANGES.forEach((_, range) => {
      for (const side of [order.slice(0, 11), order.slice(11)]) {
        const values = side
          .map((letter) => FUNDAMENTAL_DEVIATIONS[letter]?.[range] ?? null)
          .filter((value) => value !== null);
        expect(values).toEqual([...values].sort((a, b) => a - b));
      }
    });
    for (const row of Object.values(STANDARD_TOLERANCES)) expect(row).toEqual([...row].sort((a, b) => a - b));
  });

  it.each(['', 'H', '7', 'H19', 'Q7', 'i6', 'o6', 'Hh7', 'H7/g6', 'constructor1', 'JS', 'l6'])(
    'refuses %j',
    (cls) => {
      expect(micrometres('25', cls)).toBe('class-unreadable');
    },
  );
});

describe('fits', () => {
  it.each(fits.expected.rows)('$nominal $hole/$shaft is a $type fit', (row) => {
    const found = fit(String(row.nominal), row.hole, row.shaft);
    if (isUndetermined(found)) throw new Error(found.reason);
    expect(found.type).toBe(row.type);
    expect(Math.round(Number(found.maximumClearance) * 1e6)).toBe(row.max_clearance_um * 1000);
    expect(Math.round(Number(found.minimumClearance) * 1e6)).toBe(row.min_clearance_um * 1000);
  });

  it('states interference as a positive number, and none for a clearance fit', () => {
    expect(fit('25', 'H7', 'g6')).toMatchObject({
      maximumClearance: '0.041',
      minimumClearance: '0.007',
      maximumInterference: null,
      minimumInterference: null,
    });
    expect(fit('25', 'H7', 'p6')).toMatchObject({
      maximumInterference: '0.035',
      minimumInterference: '0.001',
    });
    expect(fit('50', 'H7', 'k6')).toMatchObject({ maximumInterference: '0.018', minimumInterference: null });
  });

  it('counts a clearance of exactly 0 as the standard does', () => {
    const hole = { lower: '10.00', upper: '10.02' };
    expect(fitOfLimits(hole, { lower: '9.98', upper: '10.0' })).toMatchObject({
      type: 'clearance',
      minimumClearance: '0.00',
    });
    expect(fitOfLimits(hole, { lower: '10.02', upper: '10.04' })).toMatchObject({
      type: 'interference',
      maximumClearance: '0.00',
    });
    expect(fitOfLimits(hole, { lower: '10.019', upper: '10.04' })).toMatchObject({ type: 'transition' });
  });

  it('refuses two shafts, a class that is not given and limits with an open side', () => {
    expect(fit('25', 'h7', 'g6')).toMatchObject({ code: 'not-a-fit' });
    expect(fit('25', 'H7', 'G6')).toMatchObject({ code: 'not-a-fit' });
    expect(fit('25', 'K9', 'g6')).toMatchObject({ code: 'class-not-given' });
    expect(fit('25', 'H7', 'j8')).toMatchObject({ code: 'class-not-given' });
    expect(fitOfLimits({ lower: null, upper: '1' }, { lower: '0', upper: '1' })).toMatchObject({
      code: 'size-limits-missing',
    });
    expect(fitOfLimits({ lower: '0', upper: '1' }, { lower: '0', upper: null })).toMatchObject({
      code: 'size-limits-missing',
    });
  });
});
