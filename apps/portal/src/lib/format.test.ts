// @vitest-environment node
import { describe, expect, it } from 'vitest';
import {
  countOf,
  daysUntil,
  readDecimal,
  showBytes,
  showComputed,
  showDecimal,
  showDue,
  showMomentWithZone,
} from './format.ts';

describe('decimal texts', () => {
  it('keep every digit that was typed', () => {
    expect(showDecimal('2.50', 'en')).toBe('2.50');
    expect(showDecimal('2.50', 'de')).toBe('2,50');
    expect(showDecimal('-0.010', 'en')).toBe('−0.010');
  });

  it.each([
    ['2,50', '2.50'],
    [' 12.5 ', '12.5'],
    ['−3,1', '-3.1'],
    ['1.234,5', '1.234,5'],
    ['1,234,5', '1,234,5'],
    ['', ''],
  ])('read %j as %j', (typed, kept) => {
    expect(readDecimal(typed)).toBe(kept);
  });
});

it('shows computed numbers with fixed decimals in the reader’s sign', () => {
  expect(showComputed(1.8249, 2, 'en')).toBe('1.82');
  expect(showComputed(-0.44, 2, 'de')).toBe('−0,44');
});

it('counts in words', () => {
  expect(countOf(1, 'piece', 'pieces')).toBe('1 piece');
  expect(countOf(0, 'piece', 'pieces')).toBe('0 pieces');
});

it('shows bytes in the unit that fits', () => {
  expect([999, 1500, 41_300_000].map(showBytes)).toEqual(['999 B', '1.5 kB', '41 MB']);
});

describe('days', () => {
  const evening = new Date(2026, 11, 1, 23, 30);
  it('are counted in the reader’s calendar, not in hours', () => {
    expect(daysUntil('2026-12-02', evening)).toBe(1);
    expect(daysUntil('2026-12-01', evening)).toBe(0);
  });
  it('say what is due and what is late', () => {
    expect(showDue('2026-12-01', evening)).toBe('due today');
    expect(showDue('2026-12-03', evening)).toBe('in 2 days');
    expect(showDue('2026-11-30', evening)).toBe('1 day overdue');
  });
});

it('names the zone and the moment in UTC', () => {
  expect(showMomentWithZone('2026-12-01T23:30:00.000Z', 'en-GB', 'Europe/Berlin')).toBe(
    '2 Dec 2026, 00:30, Europe/Berlin (2026-12-01 23:30:00 UTC)',
  );
});
