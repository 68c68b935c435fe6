import type { PackageState } from '@trammel/shared/status';

export interface StepFacts {
  readonly state: PackageState;
  readonly isOpen: boolean;
  readonly round: number;
  readonly questionOpen: boolean;
  readonly stops: number;
  readonly measuredRows: number;
  readonly totalRows: number;
}

/** The supplier's next thing to do, in words; null when it lies with the customer or nothing is left to do. */
export function nextStep(facts: StepFacts): string | null {
  if (!facts.isOpen) return null;
  switch (facts.state) {
    case 'requested':
      return facts.questionOpen
        ? 'Wait for the answer to the open question, or acknowledge the request'
        : 'Acknowledge the request or ask a question';
    case 'in-preparation':
      return preparationStep(facts);
    case 'sent-back':
      return `Complete what was sent back in round ${facts.round + 1}`;
    case 'rejected':
      return `Remove the causes and start round ${facts.round + 1}`;
    case 'interim-approval':
      return `Work off the conditions and start round ${facts.round + 1}`;
    case 'lapsed':
      return `Start round ${facts.round + 1}: the interim approval has run out`;
    default:
      return null;
  }
}

function preparationStep({ measuredRows, totalRows, stops }: StepFacts): string {
  const missing = totalRows - measuredRows;
  if (missing > 0 && measuredRows === 0) return 'Enter or import the readings';
  if (missing > 0) return `Measure the remaining ${counted(missing, 'row', 'rows')}`;
  if (stops > 0) return `Mend ${counted(stops, 'finding that stops', 'findings that stop')} submission`;
  return 'Read the warrant, sign and submit';
}

function counted(n: number, one: string, many: string): string {
  return `${n} ${n === 1 ? one : many}`;
}

/** Who has the package in hand, as a name; settled packages lie with nobody. */
export function holderOf(
  desk: 'supplier' | 'customer' | 'closed',
  names: { customer: string; supplier: string },
): string {
  if (desk === 'closed') return 'Nobody';
  return names[desk];
}

/** Number of a calendar date or of a moment's date in UTC, so that days are counted from midnight to midnight. */
export function dayNumber(text: string): number {
  const [year, month, day] = [text.slice(0, 4), text.slice(5, 7), text.slice(8, 10)].map(Number);
  return Date.UTC(year ?? 0, (month ?? 1) - 1, day) / 86_400_000;
}
