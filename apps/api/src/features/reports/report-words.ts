import type { CharacteristicClass } from '@trammel/shared/characteristics';
import type { reasonCodes } from '@trammel/shared/dispositions';
import type { DecisionRule, RequestReason } from '@trammel/shared/requests';
import type { PackageState, Verdict } from '@trammel/shared/status';

export const verdictWords: Record<Verdict, string> = {
  'in-tolerance': 'in tolerance',
  'out-of-tolerance': 'out of tolerance',
  undecided: 'undecided',
  'not-measured': 'not measured',
  'no-verdict': 'no verdict',
};

export const classWords: Record<CharacteristicClass, string> = {
  none: '',
  significant: 'significant',
  critical: 'critical',
  'safety-regulatory': 'safety or regulatory',
};

export const stateWords: Record<PackageState, string> = {
  requested: 'requested',
  'in-preparation': 'in preparation',
  submitted: 'submitted',
  'in-review': 'in review',
  'sent-back': 'sent back',
  approved: 'approved',
  'interim-approval': 'interim approval',
  rejected: 'rejected',
  lapsed: 'lapsed',
  withdrawn: 'withdrawn',
  superseded: 'superseded',
};

const letters: Readonly<Record<string, Verdict>> = {
  i: 'in-tolerance',
  o: 'out-of-tolerance',
  u: 'undecided',
  n: 'not-measured',
  x: 'no-verdict',
};

/** What a stored letter says of one reading. */
export function verdictOfMark(mark: string | undefined): Verdict {
  return letters[mark ?? 'n'] ?? 'not-measured';
}

/** A moment on paper names its zone. */
export function momentInUtc(instant: string): string {
  return `${instant.slice(0, 19).replace('T', ' ')} UTC`;
}

export const requestReasonWords: Record<RequestReason, string> = {
  initial: 'Initial submission',
  'engineering-change': 'Engineering change',
  tooling: 'Tooling: new, replaced or changed',
  'process-or-site-move': 'Process or site move',
  'sub-supplier-or-material': 'Sub-supplier or material change',
  correction: 'Correction',
  'requalification-after-inactivity': 'Requalification after inactivity',
  other: 'Other',
};

export function decisionRuleWords(rule: DecisionRule, rounding: 'absolute' | 'astm-e29'): string {
  const limits =
    rounding === 'absolute' ? 'limits taken as absolute' : 'readings rounded by ASTM E29 before comparison';
  if (rule.kind === 'simple') return `Simple acceptance, ${limits}`;
  const aim = rule.proves === 'supplier' ? 'conformity is proved' : 'non-conformity is proved';
  return `Guard band of the expanded uncertainty (k = 2), ${rule.uncertaintyPercentOfTolerance} % of the tolerance, ${aim}; ${limits}`;
}

export const dispositionReasonWords: Record<(typeof reasonCodes)[number], string> = {
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
