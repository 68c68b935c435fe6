import type { DecisionRule, ElementDemand } from '@trammel/shared/requests';
import type { ElementResponse, SubmissionResponse } from '@trammel/shared/submissions';
import { showDecimal } from '../../lib/format.ts';

export function decisionRuleWords(rule: DecisionRule): string {
  if (rule.kind === 'simple') return 'Simple acceptance: a reading equal to a limit is in tolerance';
  const percent = showDecimal(rule.uncertaintyPercentOfTolerance);
  return `Guard band of ${percent} % of the tolerance; the ${rule.proves} proves`;
}

export const roundingWords: Record<SubmissionResponse['roundingRule'], string> = {
  absolute: 'Absolute limits: readings are compared as they stand',
  'astm-e29': 'ASTM E29 rounding method: readings are rounded to the limit’s decimals first',
};

export const demandWords: Record<ElementDemand, string> = {
  submit: 'submit',
  'keep-at-supplier': 'keep at supplier',
  'not-required': 'not required',
};

export const elementStateWords: Record<ElementResponse['state'], string> = {
  open: 'open',
  submitted: 'submitted',
  'kept-at-supplier': 'kept at supplier',
  'not-applicable': 'not applicable',
};
