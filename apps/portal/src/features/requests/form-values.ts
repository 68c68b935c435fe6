import type { DecisionRule, RequestElement, RequestReason, RequestResponse } from '@trammel/shared/requests';

/** What the form holds while it is typed: every entry as text, in the order of the page. */
export interface RequestValues {
  partId: string;
  revisionId: string;
  supplierId: string;
  siteId: string;
  reason: RequestReason;
  reasonNote: string;
  level: number;
  elements: RequestElement[];
  streamKind: RequestResponse['streamKind'];
  streams: string;
  piecesPerStream: string;
  decisionRule: DecisionRule;
  dueOn: string;
  purchaseOrder: string;
  message: string;
  reviewerIds: string[];
}

/** Level 3 and five pieces are the usual start; the customer changes what differs (common practice). */
export const emptyRequest: RequestValues = {
  partId: '',
  revisionId: '',
  supplierId: '',
  siteId: '',
  reason: 'initial',
  reasonNote: '',
  level: 3,
  elements: [],
  streamKind: 'other',
  streams: 'Stream 1',
  piecesPerStream: '5',
  decisionRule: { kind: 'simple' },
  dueOn: '',
  purchaseOrder: '',
  message: '',
  reviewerIds: [],
};

export function valuesOf(request: RequestResponse): RequestValues {
  return {
    partId: request.part.id,
    revisionId: request.revision.id,
    supplierId: request.supplier.id,
    siteId: request.site.id,
    reason: request.reason,
    reasonNote: request.reasonNote,
    level: request.level,
    elements: request.elements,
    streamKind: request.streamKind,
    streams: request.streams.join('\n'),
    piecesPerStream: String(request.piecesPerStream),
    decisionRule: request.decisionRule,
    dueOn: request.dueOn,
    purchaseOrder: request.purchaseOrder,
    message: request.message,
    reviewerIds: request.reviewers.map((reviewer) => reviewer.id),
  };
}

/** As the contract wants it; the part is told by its revision. */
export function bodyOf({ partId: _partId, streams, piecesPerStream, ...values }: RequestValues) {
  return {
    ...values,
    streams: streams
      .split('\n')
      .map((name) => name.trim())
      .filter((name) => name !== ''),
    piecesPerStream: /^\d+$/.test(piecesPerStream.trim()) ? Number(piecesPerStream) : Number.NaN,
  };
}

const inFormOrder = [
  'revisionId',
  'supplierId',
  'siteId',
  'reason',
  'reasonNote',
  'level',
  'elements',
  'streamKind',
  'streams',
  'piecesPerStream',
  'decisionRule',
  'dueOn',
  'purchaseOrder',
  'reviewerIds',
  'message',
];

const fieldWords: Record<string, string> = {
  revisionId: 'Choose a part and its revision.',
  supplierId: 'Choose a supplier.',
  siteId: 'Choose the site that makes the part.',
  dueOn: 'Choose the date on which the package is due.',
  piecesPerStream: 'Write a whole number of pieces, 1 to 300.',
};

/** Refusals of the contract in the words of this form, the first of each field. */
export function refusalsOf(
  issues: readonly { path: readonly PropertyKey[]; message: string }[],
): { field: string; message: string }[] {
  const found = issues.map((issue) => {
    const field = String(issue.path[0] ?? '');
    const deep = field === 'decisionRule' || field === 'elements' ? issue.path.join('.') : field;
    return { field: deep, message: fieldWords[field] ?? issue.message };
  });
  const place = (field: string) => inFormOrder.indexOf(field.split('.')[0] ?? '');
  return found
    .filter((one, index) => found.findIndex((other) => other.field === one.field) === index)
    .sort((a, b) => place(a.field) - place(b.field));
}
