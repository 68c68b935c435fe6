import { describe, expect, it } from 'vitest';
import { faultsOfElement, stateAfterFiles, type ElementFacts } from './elements.rules.ts';

const element: ElementFacts = { code: 'control-plan', demand: 'submit', state: 'open', files: 0 };
const change = {
  state: 'submitted' as const,
  reason: '',
  statedPart: '',
  statedRevision: '',
  dated: null,
  note: '',
};
const places = (
  facts: Partial<ElementFacts>,
  changes: Partial<Omit<typeof change, 'state'>> & { state?: ElementFacts['state'] },
) => faultsOfElement({ ...element, ...facts }, { ...change, ...changes }).map((fault) => fault.pointer);

describe('an element', () => {
  it('is submitted by a file, or by a note that says how it was handed over', () => {
    expect(places({}, {})).toEqual(['/state']);
    expect(places({ files: 1 }, {})).toEqual([]);
    expect(places({ code: 'sample-parts' }, { note: 'Five pieces with delivery note 2291' })).toEqual([]);
  });

  it('needs a reason to be not applicable, and to be kept where it was to be submitted', () => {
    expect(places({}, { state: 'not-applicable' })).toEqual(['/reason']);
    expect(places({}, { state: 'not-applicable', reason: 'No design responsibility' })).toEqual([]);
    expect(places({}, { state: 'kept-at-supplier' })).toEqual(['/reason']);
    expect(places({ demand: 'keep-at-supplier' }, { state: 'kept-at-supplier' })).toEqual([]);
  });

  it('that the package itself fills is not set by hand', () => {
    const derived = { code: 'dimensional-results', state: 'submitted' } as const;
    expect(places(derived, { state: 'not-applicable', reason: 'Later' })).toEqual(['/state']);
    expect(places(derived, { note: 'See the third sheet' })).toEqual([]);
  });

  it('opens again only without its files', () => {
    expect(places({ files: 2, state: 'submitted' }, { state: 'open' })).toEqual(['/state']);
  });

  it('takes its state from the first file that comes and the last that goes', () => {
    expect(stateAfterFiles(element, 1)).toBe('submitted');
    expect(stateAfterFiles({ ...element, state: 'submitted' }, 0)).toBe('open');
    expect(stateAfterFiles({ ...element, state: 'kept-at-supplier' }, 0)).toBe('kept-at-supplier');
    expect(stateAfterFiles({ ...element, code: 'warrant', state: 'submitted' }, 0)).toBe('submitted');
  });
});
