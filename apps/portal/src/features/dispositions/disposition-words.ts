import type { Outcome, reasonCodes } from '@trammel/shared/dispositions';

export const outcomeWords: Record<Outcome, string> = {
  approved: 'Approved',
  'interim-approval': 'Interim approval',
  rejected: 'Rejected',
  'sent-back': 'Sent back as incomplete',
};

export const outcomeHints: Record<Outcome, string> = {
  approved: 'May be bought for production.',
  'interim-approval': 'May be bought until a date or up to a number of pieces, under conditions.',
  rejected: 'The parts or the evidence do not meet the requirements; the supplier starts a new round.',
  'sent-back': 'Something is missing. Not a judgement on the parts.',
};

export const reasonWords: Record<(typeof reasonCodes)[number], string> = {
  'out-of-tolerance': 'Out of tolerance',
  'not-reported': 'Not reported',
  'wrong-revision': 'Wrong revision',
  gauge: 'Gauge or calibration',
  'stability-or-capability': 'Stability or capability',
  'missing-element': 'Element missing',
  'element-content': 'Content of an element',
  material: 'Material',
  'sample-run': 'Sample run',
  other: 'Other',
};
