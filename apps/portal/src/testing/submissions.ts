import type { RequestResponse } from '@trammel/shared/requests';
import type { ElementResponse, SubmissionResponse, WorklistItem } from '@trammel/shared/submissions';

const id = (n: number) => `7b1c0b6e-2f0f-4c39-9a53-9d1b6a1f${String(n).padStart(4, '0')}`;

/** A package of the invented scenario in preparation at its supplier. */
export function aSubmission(change: Partial<SubmissionResponse> = {}): SubmissionResponse {
  return {
    id: id(1),
    requestId: id(2),
    requestNumber: 1,
    round: 1,
    state: 'in-preparation',
    side: 'supplier',
    customer: { id: id(3), name: 'Tarnfell Drives' },
    supplier: { id: id(4), name: 'Quillmark Turning' },
    site: 'Quillmark works',
    part: { number: 'TD-20417', name: 'Output shaft', material: '42CrMo4', safetyOrRegulatory: false },
    revision: { id: id(5), code: 'C', superseded: false, drawing: null },
    reason: 'initial',
    level: 3,
    unitSystem: 'metric',
    dueOn: '2099-12-31',
    decisionRule: { kind: 'simple' },
    roundingRule: 'absolute',
    streamKind: 'spindle',
    piecesPerStream: 3,
    routeCard: [],
    findings: { stops: 0, decides: 0, informs: 0 },
    counts: { characteristics: 16, rows: 30, out: 0, undecided: 0, unmeasured: 0, special: 3, marked: 0 },
    submittedAt: null,
    decidedAt: null,
    warrantSignature: null,
    dispositionSignature: null,
    abilities: {
      acknowledge: false,
      measure: true,
      askDeviation: true,
      sign: false,
      review: false,
      dispose: false,
      resubmit: false,
      decideDeviation: false,
    },
    version: 1,
    ...change,
  };
}

export function anElement(change: Partial<ElementResponse> = {}): ElementResponse {
  return {
    id: id(10),
    code: 'control-plan',
    label: 'Control plan',
    demand: 'submit',
    state: 'open',
    derived: false,
    reason: '',
    statedPart: '',
    statedRevision: '',
    dated: null,
    note: '',
    files: [],
    mark: null,
    markVersion: 0,
    version: 1,
    ...change,
  };
}

export function aWorklistItem(change: Partial<WorklistItem> = {}): WorklistItem {
  return {
    id: id(1),
    requestId: id(2),
    requestNumber: 1,
    round: 1,
    state: 'in-preparation',
    customerName: 'Tarnfell Drives',
    partNumber: 'TD-20417',
    partName: 'Output shaft',
    revision: 'C',
    dueOn: '2099-12-31',
    findings: { stops: 2, decides: 1, informs: 0 },
    measured: { done: 20, of: 30 },
    questionOpen: false,
    nextStep: 'Measure the remaining 10 rows',
    holder: 'Quillmark Turning',
    updatedAt: '2026-11-20T08:00:00.000Z',
    ...change,
  };
}

export function aRequest(change: Partial<RequestResponse> = {}): RequestResponse {
  return {
    id: id(2),
    number: 1,
    state: 'issued',
    side: 'supplier',
    customer: { id: id(3), name: 'Tarnfell Drives' },
    supplier: { id: id(4), name: 'Quillmark Turning' },
    site: { id: id(6), name: 'Quillmark works' },
    part: { id: id(7), number: 'TD-20417', name: 'Output shaft', safetyOrRegulatory: false },
    revision: { id: id(5), code: 'C', superseded: false },
    reason: 'initial',
    reasonNote: '',
    level: 3,
    elements: [{ code: 'control-plan', label: 'Control plan', demand: 'submit' }],
    streamKind: 'spindle',
    streams: ['Spindle 1', 'Spindle 2'],
    piecesPerStream: 3,
    decisionRule: { kind: 'simple' },
    dueOn: '2099-12-31',
    purchaseOrder: '',
    message: '',
    reviewers: [{ id: id(8), name: 'Ines Carrow' }],
    issuedAt: '2026-11-01T08:00:00.000Z',
    acknowledgedAt: null,
    acknowledgedBy: null,
    questionOpen: false,
    withdrawnReason: null,
    rounds: [{ id: id(1), round: 1, state: 'requested' }],
    abilities: {
      edit: false,
      issue: false,
      withdraw: false,
      acknowledge: true,
      write: true,
      resubmit: false,
    },
    version: 2,
    ...change,
  };
}
