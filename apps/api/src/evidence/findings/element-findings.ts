import type { Finding } from '@trammel/shared/checks';
import type { CheckedElement, CheckInputs } from '../check-inputs.ts';
import { onElement } from './finding.ts';

/** Elements that the package itself fills: the results from the readings, the warrant from its signature. */
export const derivedElements: readonly string[] = ['dimensional-results', 'warrant'];

/** The required set and what each element says about itself: R02, R26 and R37. */
export function elementFindings(inputs: CheckInputs): Finding[] {
  return inputs.elements.flatMap((element) => [...missing(element), ...contradictions(inputs, element)]);
}

function missing(element: CheckedElement): Finding[] {
  if (element.demand === 'not-required' || derivedElements.includes(element.code)) return [];
  const stop = (title: string, detail: string, remedy: string) => [
    onElement(element, { rule: 'R37', weight: 'stops-submission', title, detail, remedy }),
  ];
  if (element.state === 'open') {
    return stop(
      'Element missing',
      `${element.label} is ${element.demand === 'submit' ? 'to be submitted' : 'to be kept at the supplier'}, and nothing is stated yet.`,
      element.demand === 'submit'
        ? 'Attach the file and mark it as submitted.'
        : 'Mark it as kept at the supplier.',
    );
  }
  if (element.state === 'submitted' && element.files.length === 0) {
    return stop(
      'Element without a file',
      `${element.label} is marked as submitted, but no file is attached.`,
      'Attach the file.',
    );
  }
  if (element.state === 'kept-at-supplier' && element.demand === 'submit') {
    return stop(
      'Element kept at the supplier',
      `${element.label} is to be submitted.`,
      'Attach the file, or ask the customer to change the demand.',
    );
  }
  if (element.state !== 'not-applicable') return [];
  if (element.reason.trim() === '') {
    return stop(
      'No reason given',
      `${element.label} is marked as not applicable without a reason.`,
      'Say why it does not apply.',
    );
  }
  return [
    onElement(element, {
      rule: 'R37',
      weight: 'reviewer-decides',
      title: 'Element said not to apply',
      detail: `${element.label}: ${element.reason}`,
      remedy: 'The reviewer accepts or refuses the reason.',
    }),
  ];
}

const plain = (text: string) => text.replace(/[\s\-_./]/g, '').toLowerCase();

function contradictions(inputs: CheckInputs, element: CheckedElement): Finding[] {
  const found: Finding[] = [];
  const { partNumber, revisionCode } = inputs.submission;
  const stop = (rule: string, title: string, detail: string, remedy: string) =>
    found.push(onElement(element, { rule, weight: 'stops-submission', title, detail, remedy }));
  if (element.statedRevision !== '' && plain(element.statedRevision) !== plain(revisionCode)) {
    stop(
      'R02',
      'Wrong drawing revision',
      `${element.label} states revision ${element.statedRevision}; the package is for revision ${revisionCode}.`,
      'Attach the document for the right revision.',
    );
  }
  if (element.statedPart !== '' && plain(element.statedPart) !== plain(partNumber)) {
    stop(
      'R02',
      'Wrong part number',
      `${element.label} states part ${element.statedPart}; the package is for ${partNumber}.`,
      'Attach the document for this part.',
    );
  }
  if (element.dated !== null && element.dated > inputs.today) {
    stop(
      'R26',
      'Dated in the future',
      `${element.label} is dated ${element.dated}, after today.`,
      'Correct the date of the document.',
    );
  }
  return found;
}
