import type { RequestReason } from '@trammel/shared/requests';

/** As the reasons are said in mails. */
export const reasonWords: Record<RequestReason, string> = {
  initial: 'Initial submission',
  'engineering-change': 'Engineering change',
  tooling: 'Tooling: new, replaced or changed',
  'process-or-site-move': 'Process or site move',
  'sub-supplier-or-material': 'Sub-supplier or material change',
  correction: 'Correction',
  'requalification-after-inactivity': 'Requalification after inactivity',
  other: 'Other',
};
