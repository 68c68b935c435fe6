// @vitest-environment node
import { expect, it } from 'vitest';
import { safeReturnPath } from './paths.ts';

it.each([
  ['/submissions/1?tab=rows#b4', '/submissions/1?tab=rows#b4'],
  ['//elsewhere.example/x', '/'],
  ['/\\elsewhere.example', '/'],
  ['https://elsewhere.example', '/'],
  ['javascript:alert(1)', '/'],
  ['/sign-in', '/'],
  [null, '/'],
])('returns after sign-in from %j to %j', (wanted, address) => {
  expect(safeReturnPath(wanted)).toBe(address);
});
