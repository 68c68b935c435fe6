import { readFileSync } from 'node:fs';
import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import * as metrology from './index.ts';

const text = readFileSync(new URL('../README.md', import.meta.url), 'utf8');
const sections = text.split(/^## /m).slice(1);
const examples = sections.flatMap((section) => {
  const title = section.slice(0, section.indexOf('\n'));
  const code = [...section.matchAll(/```ts\n([\s\S]*?)```/g)].map((match) => match[1] ?? '').join('\n');
  return code === '' ? [] : [{ title, code }];
});

/** `expression; // → value` states what the expression gives; numbers agree to the digits printed. */
function runnable(code: string): { script: string; claims: number } {
  let claims = 0;
  const lines = code.split('\n').map((line) => {
    if (/^import /.test(line))
      return line.replace(/^import (\{.*\}) from '@trammel\/metrology';$/, 'const $1 = metrology;');
    const claim = /^(.+); \/\/ → (.+)$/.exec(line);
    if (claim === null) return line;
    claims += 1;
    return `claim(${JSON.stringify(claim[1])}, ${claim[1]}, ${claim[2]});`;
  });
  const { outputText } = ts.transpileModule(lines.join('\n'), {
    compilerOptions: { target: ts.ScriptTarget.ES2022, module: ts.ModuleKind.ESNext },
  });
  return { script: outputText, claims };
}

function agrees(found: unknown, stated: unknown): boolean {
  if (typeof found !== 'number' || typeof stated !== 'number') return false;
  const decimals = String(stated).split('.')[1]?.length ?? 0;
  return Math.abs(found - stated) <= 0.5000001 * 10 ** -decimals;
}

describe('the worked examples of the README', () => {
  it('are there for a package, a process and a gauge', () => {
    for (const word of ['package', 'process', 'gauge'])
      expect(examples.some(({ title }) => title.toLowerCase().includes(word))).toBe(true);
  });

  it.each(examples)('$title', ({ code }) => {
    const { script, claims } = runnable(code);
    const claim = (expression: string, found: unknown, stated: unknown) => {
      if (!agrees(found, stated)) expect(found, expression).toEqual(stated);
    };
    expect(claims).toBeGreaterThan(0);
    const run = new Function('metrology', 'claim', script) as (library: unknown, check: typeof claim) => void;
    run(metrology, claim);
  });
});
