import { readFileSync, readdirSync } from 'node:fs';
import { basename, dirname, join, relative } from 'node:path';
import { describe, expect, it } from 'vitest';
import { root } from './rooms.mjs';

interface SourceFile {
  readonly path: string;
  readonly text: string;
  readonly lines: number;
  readonly test: boolean;
}

const source: SourceFile[] = ['.ci', 'apps', 'packages'].flatMap((top) =>
  readdirSync(join(root, top), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && !entry.parentPath.includes('node_modules'))
    .filter((entry) => /\.(ts|tsx|mjs|css)$/.test(entry.name))
    .map((entry) => {
      const path = relative(root, join(entry.parentPath, entry.name));
      const text = readFileSync(join(root, path), 'utf8');
      return {
        path,
        text,
        lines: text.trimEnd().split('\n').length,
        test: /\.(test|spec)\.tsx?$/.test(path),
      };
    }),
);
const apps = source.filter((file) => file.path.startsWith('apps/'));
const long = /(^|\/)(migrations|fixtures|reference)\/|^packages\/metrology\/src\/tables\//;

const places = (files: SourceFile[], pattern: RegExp) =>
  files.flatMap(({ path, text }) =>
    text.split('\n').flatMap((line, at) => (pattern.test(line) ? [`${path}:${at + 1} ${line.trim()}`] : [])),
  );
const others = source.filter((file) => file.path !== '.ci/house.test.ts');

describe('the size of a file', () => {
  it('is 400 lines at most, 300 for a test', () => {
    const tooLong = source
      .filter((file) => !long.test(file.path) && file.lines > (file.test ? 300 : 400))
      .map((file) => `${file.path}: ${file.lines} lines`);
    expect(tooLong).toEqual([]);
  });

  it('above 250 has its reason in the first comment', () => {
    const unexplained = source
      .filter((file) => !file.test && !long.test(file.path) && file.lines > 250)
      .filter((file) => !/^(\/\/|\/\*)/.test(file.text.trimStart()))
      .map((file) => `${file.path}: ${file.lines} lines`);
    expect(unexplained).toEqual([]);
  });
});

describe('what is written', () => {
  it('is finished: nothing put off, no check switched off', () => {
    const pattern =
      /\b(TODO|FIXME|XXX|HACK)\b|eslint-disable|@ts-(ignore|nocheck|expect-error)|\bas any\b|\b(it|test|describe)\.(only|skip|todo)\(|waitForTimeout\(/;
    expect(places(others, pattern)).toEqual([]);
  });

  it('carries no style or handler inside markup, which the content policy refuses', () => {
    const product = others.filter((file) => !file.test);
    expect(places(product, /<[a-z][^>]*\s(style|on[a-z]+)="/)).toEqual([]);
    expect(places(product, /dangerouslySetInnerHTML|\.(inner|outer)HTML\s*=/)).toEqual([]);
  });

  it('takes its colours from the tokens', () => {
    const portal = apps.filter((file) => /^apps\/portal\/src\/.*\.tsx?$/.test(file.path) && !file.test);
    expect(places(portal, /['"`\s:[(]#(?:[0-9a-f]{3}|[0-9a-f]{6}|[0-9a-f]{8})\b/i)).toEqual([]);
    const palette =
      /\b(?:bg|text|border|fill|stroke|outline|ring|divide|accent|caret|decoration|from|via|to)-(?:slate|gray|zinc|neutral|stone|red|orange|amber|yellow|lime|green|emerald|teal|cyan|sky|blue|indigo|violet|purple|fuchsia|pink|rose)-\d{2,3}\b/;
    expect(places(portal, palette)).toEqual([]);
    expect(
      places(portal, /\b(shadow(-(sm|md|lg|xl|2xl))?|bg-gradient-to-\w+|rounded-(lg|xl|2xl|3xl))(?=[\s'"`])/),
    ).toEqual([]);
  });
});

describe('where it stands', () => {
  it('is never a drawer for odds and ends', () => {
    const drawers = source.filter((file) => /(^|\/)(utils?|common|helpers?|misc)(\/|\.\w+$)/.test(file.path));
    expect(drawers.map((file) => file.path)).toEqual([]);
  });

  it('is in a file named in kebab case, with the role as suffix', () => {
    const odd = source
      .map((file) => basename(file.path))
      .filter((name) => !/^[a-z0-9]+([-.][a-z0-9]+)*$/.test(name));
    expect(odd).toEqual([]);
  });

  it('is imported from where it is: apps hold no barrel', () => {
    const barrels = apps.filter(
      (file) => /\/index\.tsx?$/.test(file.path) && !file.path.startsWith('apps/api/src/database/'),
    );
    expect(barrels.map((file) => file.path)).toEqual([]);
  });

  it('has its test beside it, not in a folder for tests', () => {
    expect(source.filter((file) => file.path.includes('__tests__')).map((file) => file.path)).toEqual([]);
    const folders = new Set(source.filter((file) => !file.test).map((file) => dirname(file.path)));
    const apart = source.filter(
      (file) => file.test && !/\/(e2e|testing)\//.test(file.path) && !folders.has(dirname(file.path)),
    );
    expect(apart.map((file) => file.path)).toEqual([]);
  });
});
