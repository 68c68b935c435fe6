import type { ElementDemand, RequestElement } from '@trammel/shared/requests';

/** Read in a public transcription, not in the manual itself. */
export const elementTemplateSource =
  'Production Part Approval Process, 4th edition, AIAG 2006, table 4.2 (retention and submission requirements)';

/** S submit, R keep and show on request, * as the customer defines (kept until the customer says otherwise). */
type Demand = 'S' | 'R' | '*';

/** One row an element: code, label, demand at levels 1 to 5. */
const rows: readonly (readonly [code: string, label: string, levels: readonly Demand[]])[] = [
  ['design-record', 'Design record of the saleable product', ['R', 'S', 'S', '*', 'R']],
  ['change-documents', 'Engineering change documents, if any', ['R', 'S', 'S', '*', 'R']],
  ['engineering-approval', 'Customer engineering approval, if required', ['R', 'R', 'S', '*', 'R']],
  ['design-fmea', 'Design FMEA', ['R', 'R', 'S', '*', 'R']],
  ['process-flow', 'Process flow diagram', ['R', 'R', 'S', '*', 'R']],
  ['process-fmea', 'Process FMEA', ['R', 'R', 'S', '*', 'R']],
  ['control-plan', 'Control plan', ['R', 'R', 'S', '*', 'R']],
  ['measurement-system-studies', 'Measurement system analysis studies', ['R', 'R', 'S', '*', 'R']],
  ['dimensional-results', 'Dimensional results', ['R', 'S', 'S', '*', 'R']],
  ['material-performance-results', 'Material and performance test results', ['R', 'S', 'S', '*', 'R']],
  ['initial-process-studies', 'Initial process studies', ['R', 'R', 'S', '*', 'R']],
  ['laboratory-documentation', 'Qualified laboratory documentation', ['R', 'S', 'S', '*', 'R']],
  ['appearance-approval', 'Appearance approval report, if applicable', ['S', 'S', 'S', '*', 'R']],
  ['sample-parts', 'Sample production parts', ['R', 'S', 'S', '*', 'R']],
  ['master-sample', 'Master sample', ['R', 'R', 'R', '*', 'R']],
  ['checking-aids', 'Checking aids', ['R', 'R', 'R', '*', 'R']],
  [
    'customer-requirements',
    'Records of compliance with customer-specific requirements',
    ['R', 'R', 'S', '*', 'R'],
  ],
  ['warrant', 'Part submission warrant', ['S', 'S', 'S', 'S', 'R']],
];

export const submissionLevels = [1, 2, 3, 4, 5] as const;

/** The element list that a submission level implies. */
export function elementsOfLevel(level: number): RequestElement[] {
  return rows.map(([code, label, levels]) => ({ code, label, demand: demandOf(levels[level - 1]) }));
}

function demandOf(demand: Demand | undefined): ElementDemand {
  if (demand === undefined) throw new RangeError('A submission level is 1 to 5.');
  return demand === 'S' ? 'submit' : 'keep-at-supplier';
}
