import type { RequestElement } from '@trammel/shared/requests';
import { elementsOfLevel } from '../features/requests/element-template.ts';

/** The list of level 3 as this customer uses it: some elements stay at the supplier, some do not apply to such parts. */
export function usualElements(submitted: readonly string[]): RequestElement[] {
  return elementsOfLevel(3).map((element) => ({
    ...element,
    demand:
      submitted.includes(element.code) || element.code === 'dimensional-results' || element.code === 'warrant'
        ? 'submit'
        : element.code.startsWith('appearance')
          ? 'not-required'
          : 'keep-at-supplier',
  }));
}
