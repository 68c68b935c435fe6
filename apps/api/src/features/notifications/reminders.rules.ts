import type { PackageState } from '@trammel/shared/status';

/** Days before the due date on which the supplier is reminded (common practice). */
const steps = [1, 7, 14] as const;
export const longestNoticeDays = 14;
export const acknowledgeWithinDays = 3;

export type ReminderMark = 'due-14' | 'due-7' | 'due-1' | 'overdue' | 'not-acknowledged';

export interface RoundOnTheClock {
  readonly state: PackageState;
  readonly dueOn: string;
  /** When the supplier got it. */
  readonly startedAt: string;
}

/**
 * Which reminders have come due by now. A step that lay in the past when the supplier got the package is not made up
 * for: a request issued five days before its date starts with the reminder of the last day.
 */
export function remindersDue(round: RoundOnTheClock, now: string): ReminderMark[] {
  const due: ReminderMark[] = [];
  const today = dayNumber(now);
  const dueDay = dayNumber(round.dueOn);
  const startDay = dayNumber(round.startedAt);
  if (round.state === 'requested' && today - startDay >= acknowledgeWithinDays) due.push('not-acknowledged');
  const left = dueDay - today;
  if (left < 0) return [...due, 'overdue'];
  const step = steps.find((days) => left <= days);
  if (step !== undefined && startDay < dueDay - step) due.push(`due-${step}`);
  return due;
}

export function dayNumber(text: string): number {
  return Date.parse(`${text.slice(0, 10)}T00:00:00.000Z`) / 86_400_000;
}
