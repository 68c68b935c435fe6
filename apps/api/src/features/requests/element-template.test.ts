import { existsSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { elementsOfLevel, submissionLevels } from './element-template.ts';

// Source of the figures: the table named in elementTemplateSource, counted by hand from its transcription.
const submitCounts = [2, 8, 16, 1, 0];

const reference = new URL(
  '../../../../../../shared/reference/cases/ppap-elements-levels.json',
  import.meta.url,
);

describe('the element list of a submission level', () => {
  it.each(submissionLevels)('names 18 elements with codes used once at level %i', (level) => {
    const elements = elementsOfLevel(level);
    expect(elements).toHaveLength(18);
    expect(new Set(elements.map((element) => element.code)).size).toBe(18);
    expect(elements.filter((element) => element.demand === 'submit')).toHaveLength(
      submitCounts[level - 1] ?? -1,
    );
  });

  it('asks at level 1 for the warrant and, where there is one, the appearance report alone', () => {
    const submitted = elementsOfLevel(1).filter((element) => element.demand === 'submit');
    expect(submitted.map((element) => element.code)).toEqual(['appearance-approval', 'warrant']);
  });

  it('refuses a level that does not exist', () => {
    expect(() => elementsOfLevel(6)).toThrow(RangeError);
  });

  it.skipIf(!existsSync(reference))('agrees with the published table cell by cell', () => {
    const published = JSON.parse(readFileSync(reference, 'utf8')) as {
      expected: { rows: Record<string, string | number>[] };
    };
    for (const level of submissionLevels) {
      const ours = elementsOfLevel(level).map((element) => [element.label, element.demand]);
      const theirs = published.expected.rows.map((row) => [
        row.name,
        row[`L${level}`] === 'S' ? 'submit' : 'keep-at-supplier',
      ]);
      expect(ours).toEqual(theirs);
    }
  });
});
