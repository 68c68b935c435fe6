import type { ElementDemand } from '@trammel/shared/requests';
import type { ChangeElementRequest } from '@trammel/shared/submissions';
import type { FieldError } from '../../http/problems.ts';
import { isDerivedElement } from './submissions.rules.ts';

export interface ElementFacts {
  readonly code: string;
  readonly demand: ElementDemand;
  readonly state: ChangeElementRequest['state'];
  readonly files: number;
}

/** What of a change to an element cannot stand, each at its field. */
export function faultsOfElement(element: ElementFacts, change: ChangeElementRequest): FieldError[] {
  const faults: FieldError[] = [];
  if (isDerivedElement(element.code) && change.state !== element.state) {
    faults.push({
      pointer: '/state',
      detail: 'This element is filled from the rest of the package; its state is not set by hand.',
    });
    return faults;
  }
  if (change.state === 'not-applicable' && change.reason === '') {
    faults.push({
      pointer: '/reason',
      detail: 'Say why this element does not apply; the reviewer accepts or refuses it.',
    });
  }
  if (change.state === 'kept-at-supplier' && element.demand === 'submit' && change.reason === '') {
    faults.push({
      pointer: '/reason',
      detail: 'The customer asks for this to be submitted. Say why it is kept at the supplier.',
    });
  }
  if (
    change.state === 'submitted' &&
    !isDerivedElement(element.code) &&
    element.files === 0 &&
    change.note === ''
  ) {
    faults.push({
      pointer: '/state',
      detail: 'Attach a file, or say in the note how this was handed over.',
    });
  }
  if (change.state === 'open' && element.files > 0) {
    faults.push({ pointer: '/state', detail: 'Files are attached; remove them to open the element again.' });
  }
  return faults;
}

/** The state an element takes by itself when its first file comes or its last one goes. */
export function stateAfterFiles(element: ElementFacts, filesNow: number): ChangeElementRequest['state'] {
  if (isDerivedElement(element.code)) return element.state;
  if (filesNow > 0 && element.state !== 'submitted') return 'submitted';
  if (filesNow === 0 && element.state === 'submitted') return 'open';
  return element.state;
}
