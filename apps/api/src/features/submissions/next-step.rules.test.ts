import { describe, expect, it } from 'vitest';
import { dayNumber, holderOf, nextStep, type StepFacts } from './next-step.rules.ts';

const working: StepFacts = {
  state: 'in-preparation',
  isOpen: true,
  round: 1,
  questionOpen: false,
  stops: 0,
  measuredRows: 32,
  totalRows: 32,
};

describe('the next step of a supplier', () => {
  it.each([
    ['a new request', { state: 'requested' }, 'Acknowledge the request or ask a question'],
    [
      'a request with an open question',
      { state: 'requested', questionOpen: true },
      'Wait for the answer to the open question, or acknowledge the request',
    ],
    ['nothing measured', { measuredRows: 0, stops: 40 }, 'Enter or import the readings'],
    ['one row to go', { measuredRows: 31, stops: 1 }, 'Measure the remaining 1 row'],
    ['all measured, two stops', { stops: 2 }, 'Mend 2 findings that stop submission'],
    ['all measured, one stop', { stops: 1 }, 'Mend 1 finding that stops submission'],
    ['nothing in the way', {}, 'Read the warrant, sign and submit'],
    ['a package sent back', { state: 'sent-back' }, 'Complete what was sent back in round 2'],
    ['a rejected package', { state: 'rejected', round: 2 }, 'Remove the causes and start round 3'],
    ['an interim approval', { state: 'interim-approval' }, 'Work off the conditions and start round 2'],
    ['one that ran out', { state: 'lapsed' }, 'Start round 2: the interim approval has run out'],
  ] satisfies [string, Partial<StepFacts>, string][])('for %s is said in words', (_name, facts, words) => {
    expect(nextStep({ ...working, ...facts })).toBe(words);
  });

  it.each(['submitted', 'in-review', 'approved', 'withdrawn', 'superseded'] as const)(
    'is nothing while the package is %s',
    (state) => {
      expect(nextStep({ ...working, state })).toBeNull();
    },
  );

  it('is nothing on an old round', () => {
    expect(nextStep({ ...working, state: 'sent-back', isOpen: false })).toBeNull();
  });
});

describe('who holds a package', () => {
  it('is the organisation whose desk it lies on, and nobody once it is settled', () => {
    const names = { customer: 'Tarnfell Drives', supplier: 'Quillmark Turning' };
    expect(holderOf('supplier', names)).toBe('Quillmark Turning');
    expect(holderOf('customer', names)).toBe('Tarnfell Drives');
    expect(holderOf('closed', names)).toBe('Nobody');
  });
});

describe('days', () => {
  it('are counted by date, over a leap day and backwards', () => {
    const days = (from: string, to: string) => dayNumber(to) - dayNumber(from);
    expect(days('2028-02-28', '2028-03-01')).toBe(2);
    expect(days('2026-12-01T23:59:00.000Z', '2026-12-02')).toBe(1);
    expect(days('2026-12-05', '2026-12-01')).toBe(-4);
  });
});
