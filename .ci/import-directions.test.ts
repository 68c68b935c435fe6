import { Linter } from 'eslint';
import { readFileSync, readdirSync } from 'node:fs';
import { join, relative } from 'node:path';
import ts from 'typescript-eslint';
import { describe, expect, it } from 'vitest';
import { directionRules } from './import-directions.mjs';
import { judgeImport, root, roomMayImport } from './rooms.mjs';

const linter = new Linter({ cwd: root, configType: 'flat' });
const config: Linter.Config[] = [
  { files: ['**/*.{ts,tsx}'], languageOptions: { parser: ts.parser as Linter.Parser } },
  ...directionRules(),
];
const lint = (path: string, code: string) => linter.verify(code, config, { filename: join(root, path) });
const rulesBroken = (path: string, code: string) => lint(path, code).map((message) => message.ruleId);

const api = 'apps/api/src';
const portal = 'apps/portal/src';

describe('a wrong import fails the lint', () => {
  it.each([
    ['lib never looks up', `${portal}/lib/session.ts`, '../features/parts/api.ts'],
    ['lib never imports a component', `${portal}/lib/session.ts`, '../components/ui/button.tsx'],
    ['components never import features', `${portal}/components/ui/table.tsx`, '../../features/parts/api.ts'],
    ['components fetch nothing', `${portal}/components/ui/table.tsx`, '../../lib/api-client.ts'],
    ['features never import app', `${portal}/features/parts/api.ts`, '../../app/router.tsx'],
    ['portal features never meet', `${portal}/features/parts/api.ts`, '../requests/api.ts'],
    ['the portal never imports the API', `${portal}/features/parts/api.ts`, '../../../../api/src/config.ts'],
    ['nor by name', `${portal}/app/router.tsx`, '@trammel/api'],
    ['the portal has no Node', `${portal}/lib/format.ts`, 'node:fs'],
    ['the API never imports the portal', `${api}/app.ts`, '../../portal/src/main.tsx'],
    ['config imports nothing local', `${api}/config.ts`, './http/problems.ts'],
    ['the database knows no feature', `${api}/database/data-source.ts`, '../features/parts/parts.rules.ts'],
    ['http knows no feature', `${api}/http/validate.ts`, '../features/parts/parts.rules.ts'],
    ['storage and mail do not meet', `${api}/storage/store.ts`, '../mail/outbox.ts'],
    [
      'no feature calls another service',
      `${api}/features/checks/checks.service.ts`,
      '../parts/parts.service.ts',
    ],
    ['no feature imports app', `${api}/features/checks/checks.service.ts`, '../../app.ts'],
    ['app never imports main', `${api}/app.ts`, './main.ts'],
    ['tests stay with tests', `${api}/features/parts/parts.service.ts`, '../../testing/test-app.ts'],
    ['the product never imports the demo', `${api}/app.ts`, './demo/services.ts'],
    ['SQLite is reached through database/', `${api}/features/parts/parts.queries.ts`, 'better-sqlite3'],
    ['the store is reached through storage/', `${api}/features/parts/parts.service.ts`, '@aws-sdk/client-s3'],
    ['an undeclared package', `${api}/features/parts/parts.service.ts`, 'lodash'],
    [
      'metrology imports nothing of ours',
      'packages/metrology/src/decimal/decimal.ts',
      '@trammel/shared/status',
    ],
    ['metrology imports no Node module', 'packages/metrology/src/decimal/decimal.ts', 'node:crypto'],
    ['metrology stays at home', 'packages/metrology/src/decimal/decimal.ts', '../../../shared/src/status.ts'],
    ['shared imports zod only', 'packages/shared/src/status.ts', '@trammel/metrology'],
    ['shared imports no Node module', 'packages/shared/src/status.ts', 'fs'],
    ['a local import without its extension', `${portal}/lib/session.ts`, './format'],
    ['packages by name, not by path', `${api}/app.ts`, '../../../packages/shared/src/status.ts'],
    ['a room nobody knows', `${api}/helpers/x.ts`, '../config.ts'],
  ])('%s', (_title, file, specifier) => {
    expect(rulesBroken(file, `import { x } from '${specifier}';\nx();\n`)).toContain(
      'house/import-direction',
    );
    expect(rulesBroken(file, `export * from '${specifier}';\n`)).toContain('house/import-direction');
    expect(rulesBroken(file, `void import('${specifier}');\n`)).toContain('house/import-direction');
  });

  it.each([
    [`${portal}/app/routes/parts.tsx`, '../../features/parts/api.ts'],
    [`${portal}/features/parts/api.ts`, '@trammel/shared/parts'],
    [`${portal}/components/charts/beam.tsx`, '@trammel/metrology'],
    [`${portal}/components/ui/button.tsx`, '../../lib/cn.ts'],
    [`${portal}/main.tsx`, './index.css'],
    [`${api}/features/checks/checks.service.ts`, '../parts/parts.queries.ts'],
    [`${api}/features/checks/checks.service.ts`, '../../database/write-transaction.ts'],
    [`${api}/features/checks/checks.service.test.ts`, '../../testing/test-app.ts'],
    [`${api}/features/checks/checks.service.ts`, 'node:crypto'],
    [`${api}/main.ts`, './app.ts'],
    [`${api}/demo/services.ts`, 's3rver'],
    ['packages/shared/src/status.ts', 'zod'],
    ['packages/metrology/src/decimal/decimal.test.ts', 'fast-check'],
  ])('%s may import %s', (file, specifier) => {
    expect(lint(file, `import { x } from '${specifier}';\nx();\n`)).toEqual([]);
  });

  it('checks type-only imports for direction as well', () => {
    const code = "import type { X } from '../requests/api.ts';\nexport type Y = X;\n";
    expect(rulesBroken(`${portal}/features/parts/api.ts`, code)).toEqual(['house/import-direction']);
  });

  it('refuses a clock, chance and surroundings in a calculation', () => {
    const code = 'export const f = () => Math.random() + Date.now() + performance.now();\n';
    expect(rulesBroken('packages/metrology/src/decimal/decimal.ts', code)).toEqual([
      'no-restricted-properties',
      'no-restricted-globals',
      'no-restricted-globals',
    ]);
  });

  it('reads the environment in config.ts only', () => {
    const code = 'export const port = process.env.PORT;\n';
    expect(rulesBroken(`${api}/features/parts/parts.service.ts`, code)).toEqual(['no-restricted-properties']);
    expect(rulesBroken(`${api}/config.ts`, code)).toEqual([]);
  });

  it('refuses a default export', () => {
    expect(rulesBroken(`${portal}/lib/format.ts`, 'export default 1;\n')).toEqual(['no-restricted-exports']);
  });
});

describe('a write outside the write transaction fails the lint', () => {
  const service = `${api}/features/parts/parts.service.ts`;
  it.each([
    'export const f = (dataSource) => dataSource.getRepository(Part).save(part);',
    'export const f = (writer) => writer.manager.insert(Part, part);',
    'export const f = (partRepository) => partRepository.delete(id);',
    'const rows = dataSource.getRepository(Part); export const f = () => rows.update(id, { a: 1 });',
    'export const f = (db) => db.transaction(async (m) => m.save(part));',
    'export const f = (m: EntityManager) => m.transaction(async (inner) => inner.save(part));',
  ])('%s', (code) => {
    expect(rulesBroken(service, code)).toContain('house/write-gate');
  });

  it.each([
    'export const f = () => writeTransaction(async (manager) => { await manager.save(part); });',
    'export const f = (database) => database.writeTransaction(async (m) => m.getRepository(Part).save(part));',
    'export async function f(manager: EntityManager) { await manager.update(Part, { id }, { a: 1 }); }',
    'export async function f(manager: EntityManager) { const parts = manager.getRepository(Part); await parts.save(x); }',
    "export const f = (hash) => hash.update('text');",
    'export const f = (seen: Set<string>) => seen.delete(id);',
  ])('%s passes', (code) => {
    expect(lint(service, code)).toEqual([]);
  });
});

describe('the real tree', () => {
  const files = ['apps', 'packages'].flatMap((top) =>
    readdirSync(join(root, top), { recursive: true, withFileTypes: true })
      .filter(
        (entry) => entry.isFile() && /\.tsx?$/.test(entry.name) && !entry.parentPath.includes('node_modules'),
      )
      .map((entry) => relative(root, join(entry.parentPath, entry.name))),
  );

  it('holds no import against the direction', () => {
    const wrong = files.flatMap((file) => {
      const text = readFileSync(join(root, file), 'utf8');
      const imports = text.matchAll(/^\s*(?:import|export)\s+(type\s)?(?:[^'";]*?\sfrom\s+)?'([^']+)';/gm);
      return [...imports].flatMap(([, typeOnly, specifier]) => {
        const reason = judgeImport(file, specifier ?? '', Boolean(typeOnly));
        return reason ? [`${file} imports ${specifier}: ${reason}`] : [];
      });
    });
    expect(files.length).toBeGreaterThan(0);
    expect(wrong).toEqual([]);
  });

  it.each(['api', 'portal'] as const)('has no room in %s that the table does not know', (workspace) => {
    const known = [...Object.keys(roomMayImport[workspace]), 'testing'];
    const rooms = readdirSync(join(root, 'apps', workspace, 'src'), { withFileTypes: true })
      .filter((entry) => entry.isDirectory())
      .map((entry) => entry.name);
    expect(rooms.filter((room) => !known.includes(room))).toEqual([]);
  });
});
