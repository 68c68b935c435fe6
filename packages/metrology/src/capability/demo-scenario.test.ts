import { describe, expect, it } from 'vitest';
import { demoStudy } from '../testing/demo-studies.ts';
import { isUndetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { capabilityStudy } from './capability-study.ts';
import type { CapabilityStudy, CapabilityStudyRequest } from './capability-study.ts';
import { minimumLowerBound } from './index-intervals.ts';
import { streamStudies } from './stream-studies.ts';

function sure<T>(answer: T | Undetermined): T {
  if (isUndetermined(answer)) throw new Error(answer.reason);
  return answer;
}

const inControl = { state: 'in-control' } as const;

function study(values: number[], request: Omit<CapabilityStudyRequest, 'values'>): CapabilityStudy {
  return sure(capabilityStudy({ values, control: inControl, ...request }));
}

// The demo scenario is invented; its expected figures stand in the description of the scenario.
describe('output shaft, row 3: bearing seat 25.002 to 25.015, two spindles', () => {
  const limits = { lower: 25.002, upper: 25.015 };
  const bothSpindles = () =>
    ['spindle 1', 'spindle 2'].map((stream) =>
      study(demoStudy('TD-20417', '3', stream), { limits, subgroupSize: 5 }),
    );

  it('shows Ppk 1.82 and 1.78, both met', () => {
    const [first, second] = bothSpindles();
    expect([first?.index.toFixed(2), second?.index.toFixed(2)]).toEqual(['1.82', '1.78']);
    expect([first?.decision, second?.decision]).toEqual(['met', 'met']);
  });

  it('shows the lower bounds 1.60 and 1.56', () => {
    const [first, second] = bothSpindles();
    expect(sure(first?.lowerBound ?? 0)).toMatchObject({ confidence: 0.95 });
    const bounds = [first, second].map((one) => sure(one?.lowerBound ?? { lower: NaN }).lower);
    expect(bounds[0]?.toFixed(2)).toBe('1.60');
    // Unrounded 1.5656. The scenario's 1.56 is the bound of the index rounded to 1.78 (1.5648), and the noncentral-t bound (1.5638).
    expect(bounds[1]).toBeCloseTo(1.5656, 4);
    expect(sure(minimumLowerBound(1.78, 100)).lower.toFixed(2)).toBe('1.56');
    expect(
      sure(minimumLowerBound(second?.index ?? NaN, 100, { method: 'noncentral-t' })).lower.toFixed(2),
    ).toBe('1.56');
  });
});

describe('output shaft, row 10: runout at most 0.015', () => {
  const limits = { upper: 0.015, naturalLower: 0 };
  const runout = () => study(demoStudy('TD-20417', '10', 'spindle 1'), { limits });

  it('reads 2.10 by the normal formula and 1.60 by the fitted distribution, which counts', () => {
    const result = runout();
    expect(result.overall.minimum.toFixed(2)).toBe('2.10');
    expect(result.index.toFixed(2)).toBe('1.60');
    expect(sure(result.comparison).chosen?.model.family).toBe('gamma');
    expect(result.decision).toBe('reviewer-decides');
  });

  it('rejects the normal distribution and keeps the fit', () => {
    const result = runout();
    expect(result.normality.rejected).toBe(true);
    expect(sure(result.comparison).chosen?.quality.rejected).toBe(false);
  });
});

describe('mounting bracket', () => {
  it('row 3: Ppk 1.42, middle band', () => {
    const result = study(demoStudy('TD-40256', '3', 'die 1'), {
      limits: { lower: 27.75, upper: 28.25 },
      subgroupSize: 5,
    });
    expect(result.index.toFixed(2)).toBe('1.42');
    expect(result.decision).toBe('reviewer-decides');
  });

  it('row 8: Cpk 2.48 looks fine, Ppk is 1.22 and the chart makes it unstable', () => {
    const result = study(demoStudy('TD-40256', '8', 'die 1'), {
      limits: { lower: 8.9, upper: 9.1 },
      subgroupSize: 5,
      control: { state: 'not-in-control', reasons: ['12 of 20 means outside the control limits'] },
    });
    expect(sure(result.within).minimum.toFixed(2)).toBe('2.48');
    expect(result.overall.minimum.toFixed(2)).toBe('1.22');
    expect(result.decision).toBe('unstable');
    expect(result.isCapability).toBe(false);
  });
});

describe('gear housing cover, row 4: boss bore 19.00 to 19.05, four cavities', () => {
  const streams = [1, 2, 3, 4].map((cavity) => ({
    name: `cavity ${cavity}`,
    values: demoStudy('TD-31880', '4', `cavity ${cavity}`),
    control: inControl,
  }));
  const options = { limits: { lower: 19, upper: 19.05 }, subgroupSize: 5, minimumReadings: 50 };

  it('keeps the cavities apart: 3.09, 2.68, -0.44, 2.27, the third the worst', () => {
    const result = streamStudies(streams, options);
    expect(result.byStream.map((stream) => sure(stream.study).index.toFixed(2))).toEqual([
      '3.09',
      '2.68',
      '-0.44',
      '2.27',
    ]);
    expect(result.byStream.map((stream) => sure(stream.study).decision)).toEqual([
      'met',
      'met',
      'not-met',
      'met',
    ]);
    expect(sure(result.worst).name).toBe('cavity 3');
    expect(result.pooled).toBeUndefined();
  });

  it('pools only when told to, says so, and gives 0.45', () => {
    const { pooled } = streamStudies(streams, { ...options, pool: true });
    expect(sure(pooled?.study ?? 0)).toMatchObject({ isCapability: false, decision: 'control-not-shown' });
    expect((sure(pooled?.study ?? 0) as CapabilityStudy).index.toFixed(2)).toBe('0.45');
    expect(pooled?.label).toBe(
      'pooled over 4 streams (cavity 1, cavity 2, cavity 3, cavity 4); can hide a bad stream',
    );
  });

  it('sees the centre of cavity 3 outside the band and asks to recentre it by 0.029', () => {
    const third = sure(streamStudies(streams, options).byStream[2]?.study ?? 0) as CapabilityStudy;
    const relation = sure(third.relation);
    expect(relation.word).toBe('beyond-one-side');
    expect(relation.mend.recentreBy).toBeCloseTo(-0.02918, 5);
    expect(relation.mend.advice).toBe('recentre');
    expect(relation.mend.reduceSpreadBy).toMatchObject({ code: 'centre-outside' });
  });

  it('has no worst stream when none can be studied', () => {
    expect(streamStudies([{ name: 'a', values: [1] }], options).worst).toMatchObject({ code: 'too-few' });
  });
});

it('valve manifold, row 4: ten readings, Ppk 2.29, lower bound 1.39, too few', () => {
  const result = study(demoStudy('TD-52711', '4', 'line 1'), { limits: { lower: 18, upper: 18.018 } });
  expect(result.n).toBe(10);
  expect(result.index.toFixed(2)).toBe('2.29');
  expect(sure(result.lowerBound).lower.toFixed(2)).toBe('1.39');
  expect(result.decision).toBe('too-few');
});
