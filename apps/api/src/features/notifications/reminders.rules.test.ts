import { describe, expect, it } from 'vitest';
import { remindersDue, type RoundOnTheClock } from './reminders.rules.ts';

const round: RoundOnTheClock = {
  state: 'in-preparation',
  dueOn: '2026-12-31',
  startedAt: '2026-11-30T09:00:00.000Z',
};
const at = (date: string) => `${date}T07:00:00.000Z`;

describe('reminders of a due date', () => {
  it.each([
    ['15 days before', '2026-12-16', []],
    ['14 days before', '2026-12-17', ['due-14']],
    ['8 days before', '2026-12-23', ['due-14']],
    ['7 days before', '2026-12-24', ['due-7']],
    ['1 day before', '2026-12-30', ['due-1']],
    ['on the day', '2026-12-31', ['due-1']],
    ['the day after', '2027-01-01', ['overdue']],
  ])('%s', (_name, date, expected) => {
    expect(remindersDue(round, at(date))).toEqual(expected);
  });

  it('are not made up for when the package came later than the step', () => {
    const late = { ...round, startedAt: at('2026-12-26') };
    expect(remindersDue(late, at('2026-12-26'))).toEqual([]);
    expect(remindersDue(late, at('2026-12-30'))).toEqual(['due-1']);
  });

  it('ask after three days for an acknowledgement that has not come', () => {
    const waiting: RoundOnTheClock = { ...round, state: 'requested' };
    expect(remindersDue(waiting, at('2026-12-02'))).toEqual([]);
    expect(remindersDue(waiting, at('2026-12-03'))).toEqual(['not-acknowledged']);
    expect(remindersDue(waiting, at('2027-01-02'))).toEqual(['not-acknowledged', 'overdue']);
  });
});
