import { expect, it } from 'vitest';
import { labelsFrom } from './piece-labels.ts';

it('reads labels one a line, and runs that keep letters and leading zeros', () => {
  expect(labelsFrom('4-1\n4-2; 4-3')).toEqual(['4-1', '4-2', '4-3']);
  expect(labelsFrom('A7..A10')).toEqual(['A7', 'A8', 'A9', 'A10']);
  expect(labelsFrom('SN008..011')).toEqual(['SN008', 'SN009', 'SN010', 'SN011']);
  expect(labelsFrom('2-1..2-3')).toEqual(['2-1', '2-2', '2-3']);
});

it('takes what is no run as a label: backwards, other letters, or longer than a stream', () => {
  for (const line of ['9..3', 'A1..B4', '1..5000']) expect(labelsFrom(line)).toEqual([line]);
  expect(labelsFrom(' \n ')).toEqual([]);
});
