import { readFileSync } from 'node:fs';

/**
 * Study readings of the invented demo scenario (testing/fixtures/demo-studies.csv, the product's own demo data): one stream of one
 * characteristic, in production order.
 */
export function demoStudy(part: string, characteristic: string, stream: string): number[] {
  const text = readFileSync(new URL('./fixtures/demo-studies.csv', import.meta.url), 'utf8');
  return text
    .trim()
    .split('\n')
    .slice(1)
    .map((line) => line.split(','))
    .filter((cells) => cells[0] === part && cells[1] === characteristic && cells[2] === stream)
    .map((cells) => Number(cells[4]));
}
