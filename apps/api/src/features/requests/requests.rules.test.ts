import { saveRequestRequest } from '@trammel/shared/requests';
import { packageStates } from '@trammel/shared/status';
import { describe, expect, it } from 'vitest';
import { elementsOfLevel } from './element-template.ts';
import { afterMessage, faultsOfRequest, issueBlockers, requestAbilities } from './requests.rules.ts';

const body = saveRequestRequest.parse({
  supplierId: '11111111-1111-4111-8111-111111111111',
  siteId: '22222222-2222-4222-8222-222222222222',
  revisionId: '33333333-3333-4333-8333-333333333333',
  reason: 'initial',
  level: 3,
  elements: elementsOfLevel(3),
  streams: ['Spindle 1', 'Spindle 2'],
  piecesPerStream: 3,
  decisionRule: { kind: 'simple' },
  dueOn: '2026-12-31',
  reviewerIds: ['44444444-4444-4444-8444-444444444444'],
});
const pointers = (changes: Partial<typeof body>) =>
  faultsOfRequest({ ...body, ...changes }).map((fault) => fault.pointer);

describe('a request as written', () => {
  it('has no fault when it is in order', () => {
    expect(faultsOfRequest(body)).toEqual([]);
  });

  it('names each stream, element and reviewer once, whatever the case', () => {
    expect(pointers({ streams: ['Cavity 1', 'cavity 1', 'Cavity 2'] })).toEqual(['/streams/1']);
    expect(
      pointers({ elements: [...elementsOfLevel(3).slice(0, 2), ...elementsOfLevel(3).slice(0, 1)] }),
    ).toEqual(['/elements/2/code']);
    const [reviewer] = body.reviewerIds;
    expect(pointers({ reviewerIds: [reviewer ?? '', reviewer ?? ''] })).toEqual(['/reviewerIds/1']);
  });

  it('says what another reason is', () => {
    expect(pointers({ reason: 'other' })).toEqual(['/reasonNote']);
    expect(pointers({ reason: 'other', reasonNote: 'Fire in the coating shop' })).toEqual([]);
  });

  it.each(['0', '-5', '50', '80'])('refuses a guard band by %s %% of the tolerance', (percent) => {
    const decisionRule = {
      kind: 'guard-band',
      uncertaintyPercentOfTolerance: percent,
      proves: 'supplier',
    } as const;
    expect(pointers({ decisionRule })).toEqual(['/decisionRule/uncertaintyPercentOfTolerance']);
  });
});

describe('issuing', () => {
  const ready = {
    revisionCode: 'C',
    revisionState: 'released',
    dueOn: '2026-12-31',
    today: '2026-12-31',
    inWorkNumber: null,
  } as const;

  it('needs a released revision, a date that has not passed and no package in work', () => {
    expect(issueBlockers(ready)).toEqual([]);
    expect(issueBlockers({ ...ready, revisionState: 'draft' })).toEqual(['Release revision C first.']);
    expect(
      issueBlockers({ ...ready, revisionState: 'superseded', today: '2027-01-01', inWorkNumber: 4 }),
    ).toHaveLength(3);
  });
});

describe('what may be done with a request', () => {
  it('differs by side: the customer withdraws, the supplier acknowledges and resubmits', () => {
    const requested = { state: 'requested', isOpen: true } as const;
    expect(requestAbilities('customer', 'issued', requested)).toMatchObject({
      withdraw: true,
      acknowledge: false,
    });
    expect(requestAbilities('supplier', 'issued', requested)).toMatchObject({
      withdraw: false,
      acknowledge: true,
    });
    const rejected = { state: 'rejected', isOpen: true } as const;
    expect(requestAbilities('supplier', 'issued', rejected).resubmit).toBe(true);
    expect(requestAbilities('customer', 'issued', rejected).resubmit).toBe(false);
  });

  it('is never to withdraw what was approved, even for a time', () => {
    const open = packageStates.filter(
      (state) => requestAbilities('customer', 'issued', { state, isOpen: true }).withdraw,
    );
    expect(open).toEqual(['requested', 'in-preparation', 'submitted', 'in-review', 'sent-back', 'rejected']);
  });

  it('is to edit and issue while it is a draft only', () => {
    expect(requestAbilities('customer', 'draft', null)).toMatchObject({
      edit: true,
      issue: true,
      write: false,
    });
    expect(requestAbilities('customer', 'withdrawn', null)).toMatchObject({
      edit: false,
      issue: false,
      write: false,
    });
  });
});

describe('the thread', () => {
  it('opens a question, keeps it open over notes, and closes it by the other side only', () => {
    const base = { side: 'supplier', questionOpen: false, askedBy: null } as const;
    expect(afterMessage({ ...base, kind: 'question' })).toEqual({ questionOpen: true });
    const open = { questionOpen: true, askedBy: 'supplier' } as const;
    expect(afterMessage({ side: 'supplier', kind: 'note', ...open })).toEqual({ questionOpen: true });
    expect(afterMessage({ side: 'supplier', kind: 'answer', ...open })).toHaveProperty('refused');
    expect(afterMessage({ side: 'customer', kind: 'answer', ...open })).toEqual({ questionOpen: false });
    expect(afterMessage({ ...base, kind: 'answer' })).toHaveProperty('refused');
  });
});
