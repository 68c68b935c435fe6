import type { DecisionRule, ElementDemand, RequestReason, RequestResponse } from '@trammel/shared/requests';
import { showDecimal } from '../../lib/format.ts';

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

export const streamKindWords: Record<RequestResponse['streamKind'], string> = {
  cavity: 'Cavities',
  spindle: 'Spindles',
  die: 'Dies',
  line: 'Lines',
  pattern: 'Patterns',
  other: 'Other',
};

export const demandWords: Record<ElementDemand, string> = {
  submit: 'submit',
  'keep-at-supplier': 'keep at supplier',
  'not-required': 'not required',
};

/** Short meaning of the submission levels, as the published level table has them. */
export const levelWords: Record<number, string> = {
  1: 'Warrant only, and the appearance report where there is one',
  2: 'Warrant with samples and limited data',
  3: 'Warrant with samples and complete data',
  4: 'Warrant and what the customer defines',
  5: 'Warrant with samples and complete data, reviewed at the supplier’s site',
};

export const requestStateWords: Record<RequestResponse['state'], string> = {
  draft: 'draft',
  issued: 'issued',
  withdrawn: 'withdrawn',
};

export function ruleWords(rule: DecisionRule): string {
  if (rule.kind === 'simple') return 'Simple acceptance';
  return `Guard band of ${showDecimal(rule.uncertaintyPercentOfTolerance)} % of the tolerance; the ${rule.proves} proves`;
}
