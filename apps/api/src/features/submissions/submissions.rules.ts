import type { Permission } from '@trammel/shared/roles';
import { openForReview, openForSupplier, type PackageState } from '@trammel/shared/status';

export type Side = 'customer' | 'supplier';

interface Person {
  readonly userId: string;
  readonly organisationId: string;
  readonly permissions: ReadonlySet<Permission>;
}

interface Ends {
  readonly customerId: string;
  readonly supplierId: string;
}

/**
 * On which end of a request or package a person stands: the organisation settles it, and the role must be that of the
 * end. An organisation may be customer of one and supplier to another, so nothing follows from the organisation alone.
 */
export function sideOf(actor: Person, ends: Ends): Side | null {
  if (ends.customerId === actor.organisationId && actor.permissions.has('request:write')) return 'customer';
  if (ends.supplierId === actor.organisationId && actor.permissions.has('request:answer')) return 'supplier';
  return null;
}

/** States after which the supplier may hand in the next round. */
export const openForResubmission: readonly PackageState[] = [
  'sent-back',
  'rejected',
  'interim-approval',
  'lapsed',
];

/** Rounds that someone is working on: at most one for the same revision and site. */
export const inWork: readonly PackageState[] = ['requested', 'in-preparation', 'submitted', 'in-review'];

/** Elements filled from other data of the package. */
const derivedElements: ReadonlySet<string> = new Set(['dimensional-results', 'warrant']);

export function isDerivedElement(code: string): boolean {
  return derivedElements.has(code);
}

interface Round {
  readonly state: PackageState;
  readonly isOpen: boolean;
  readonly submittedById: string | null;
}

export interface SubmissionAbilities {
  readonly acknowledge: boolean;
  readonly measure: boolean;
  readonly askDeviation: boolean;
  readonly sign: boolean;
  readonly review: boolean;
  readonly dispose: boolean;
  readonly resubmit: boolean;
  readonly decideDeviation: boolean;
}

export function abilitiesOn(actor: Person, side: Side, round: Round): SubmissionAbilities {
  const supplier = (permission: Permission, states: readonly PackageState[]) =>
    side === 'supplier' && actor.permissions.has(permission) && states.includes(round.state);
  const customer = (permission: Permission) =>
    side === 'customer' && actor.permissions.has(permission) && openForReview.includes(round.state);
  return {
    acknowledge: supplier('request:answer', ['requested']),
    measure: supplier('measurement:write', openForSupplier),
    askDeviation: supplier('deviation:ask', openForSupplier),
    sign: supplier('warrant:sign', openForSupplier),
    review: customer('review:decide'),
    // Nobody decides on what they submitted.
    dispose: customer('disposition:sign') && round.submittedById !== actor.userId,
    resubmit: round.isOpen && supplier('request:answer', openForResubmission),
    decideDeviation: customer('deviation:decide'),
  };
}

/** Reference and basic dimensions have no verdict of their own, so nobody owes a reading for them. */
export function countRows(characteristics: readonly { kind: string }[], streams: number): number {
  const owed = characteristics.filter(({ kind }) => kind !== 'reference' && kind !== 'basic');
  return owed.length * streams;
}

/** Labels of the pieces a request asks for: 1, 2, 3 where one stream is named, 2-1 for the first piece of the second. */
export function pieceLabel(stream: number, piece: number, streams: number): string {
  return streams === 1 ? String(piece) : `${stream}-${piece}`;
}

/** Place of the next piece in its stream. A removed piece takes its readings with it, so its place holds nothing. */
export function nextSlot(slots: readonly number[]): number {
  return Math.max(-1, ...slots) + 1;
}
