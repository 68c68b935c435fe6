import type { SubmissionResponse } from '@trammel/shared/submissions';
import { paths } from '../../../lib/paths.ts';

export interface PackageTab {
  label: string;
  path: (submissionId: string) => string;
  /** Whether there is something behind it for this person now; left out where there always is. */
  shows?: (submission: SubmissionResponse) => boolean;
  /** A number worth seeing before the tab is opened. */
  count?: (submission: SubmissionResponse) => number;
}

/** The supplier's own work, and for the customer what was submitted. */
export const hasEvidence = (submission: SubmissionResponse): boolean =>
  submission.side === 'supplier' ? submission.state !== 'requested' : submission.submittedAt !== null;

/** Parts of a package's page in the order of the work. A page of a package adds its line here. */
export const packageTabs: readonly PackageTab[] = [
  { label: 'Overview', path: paths.submission },
  { label: 'Measurements', path: paths.measurements, shows: hasEvidence },
  { label: 'Evidence', path: paths.evidence, shows: hasEvidence },
  {
    label: 'Findings',
    path: paths.check,
    shows: hasEvidence,
    count: (submission) => submission.findings.stops,
  },
  { label: 'Deviations', path: paths.deviations, shows: hasEvidence },
  { label: 'Warrant', path: paths.warrant, shows: hasEvidence },
  { label: 'Review', path: paths.review, shows: (submission) => submission.submittedAt !== null },
  { label: 'Disposition', path: paths.disposition, shows: (submission) => submission.submittedAt !== null },
];
