import type { SubmissionResponse } from '@trammel/shared/submissions';
import { countOf } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';

export interface NextStep {
  title: string;
  text: string;
  link?: { to: string; label: string };
}

/** What this person does next on a package, or who does it. */
export function whatComesNext(submission: SubmissionResponse): NextStep {
  return submission.side === 'supplier' ? forSupplier(submission) : forCustomer(submission);
}

function forSupplier(submission: SubmissionResponse): NextStep {
  const { counts, findings, customer } = submission;
  const thread = { to: paths.request(submission.requestId), label: 'Open the request' };
  switch (submission.state) {
    case 'requested':
      return {
        title: 'Acknowledge the request, or ask what is unclear',
        text: `${customer.name} waits for your acknowledgement. The package can be filled from then on.`,
        link: thread,
      };
    case 'in-preparation':
      if (counts.unmeasured > 0) {
        return {
          title: `${countOf(counts.unmeasured, 'row has', 'rows have')} no readings yet`,
          text: 'Enter readings in the grid or import them, and attach the evidence that was asked for.',
          link: { to: paths.measurements(submission.id), label: 'Open the measurements' },
        };
      }
      if (findings.stops > 0) {
        return {
          title: `${countOf(findings.stops, 'finding stops', 'findings stop')} submission`,
          text: 'Each finding says where it is and what mends it.',
          link: { to: paths.check(submission.id), label: 'Open the findings' },
        };
      }
      return {
        title: 'Nothing stops submission',
        text: 'A person with the authority to sign reads the warrant and signs; signing submits the package.',
        link: { to: paths.warrant(submission.id), label: 'Open the warrant' },
      };
    case 'submitted':
    case 'in-review':
      return {
        title: `With ${customer.name}`,
        text: 'The package is frozen and in review. You get a mail when it is decided or sent back.',
      };
    case 'sent-back':
    case 'rejected':
      return {
        title: submission.state === 'rejected' ? 'Rejected' : 'Sent back as incomplete',
        text: 'Read the reasons and remarks, then start the next round. It begins as a copy of this one.',
      };
    case 'interim-approval':
      return {
        title: 'Approved for a time',
        text: 'Work off the conditions and start the next round before the end date.',
      };
    case 'lapsed':
      return {
        title: 'The interim approval has run out',
        text: 'Nothing may be bought on it any more. Start the next round to bring the part back.',
      };
    default:
      return settled(submission);
  }
}

function forCustomer(submission: SubmissionResponse): NextStep {
  const { supplier, counts, abilities } = submission;
  switch (submission.state) {
    case 'requested':
      return {
        title: `${supplier.name} has not acknowledged yet`,
        text: 'The supplier was told by mail and is reminded after three days.',
        link: { to: paths.request(submission.requestId), label: 'Open the request' },
      };
    case 'in-preparation':
      return {
        title: `In preparation at ${supplier.name}`,
        text: `${counts.rows - counts.unmeasured} of ${countOf(counts.rows, 'row is', 'rows are')} measured. What came out shows once the warrant is signed.`,
      };
    case 'submitted':
    case 'in-review':
      return {
        title: abilities.review ? 'Waits for your review' : 'Waits for review',
        text: `${counts.marked} of ${countOf(counts.characteristics, 'characteristic is', 'characteristics are')} marked. Failing, undecided and special rows come first.`,
        ...(abilities.review && { link: { to: paths.review(submission.id), label: 'Open the review' } }),
      };
    case 'sent-back':
    case 'rejected':
    case 'interim-approval':
      return {
        title: `With ${supplier.name}`,
        text: 'The supplier starts the next round; it comes back to the review desk when it is signed.',
      };
    default:
      return settled(submission);
  }
}

function settled(submission: SubmissionResponse): NextStep {
  switch (submission.state) {
    case 'approved':
      return {
        title: 'Approved',
        text: 'Nothing is left to do. The package stays readable as it was signed.',
      };
    case 'withdrawn':
      return {
        title: 'Withdrawn',
        text: 'The customer called the request off. What was entered stays readable.',
      };
    case 'lapsed':
      return {
        title: 'The interim approval has run out',
        text: 'Purchasing reads hold. The supplier starts the next round, or a new request brings the part back.',
      };
    default:
      return { title: 'Superseded', text: 'A newer package took the place of this one.' };
  }
}
