// Import directions and the write gate as ESLint rules: a wrong import is a failed build.
import { judgeImport } from './rooms.mjs';
import { writeGate } from './write-gate.mjs';

export const importDirection = {
  meta: {
    type: 'problem',
    docs: { description: 'Imports point one way through the rooms of the house.' },
    messages: { wrong: "Import of '{{specifier}}': {{reason}}." },
    schema: [],
  },
  create(context) {
    const check = (source, typeOnly) => {
      if (source?.type !== 'Literal' || typeof source.value !== 'string') return;
      const reason = judgeImport(context.filename, source.value, typeOnly);
      if (reason)
        context.report({ node: source, messageId: 'wrong', data: { specifier: source.value, reason } });
    };
    return {
      ImportDeclaration: (node) => check(node.source, node.importKind === 'type'),
      ExportNamedDeclaration: (node) => check(node.source, node.exportKind === 'type'),
      ExportAllDeclaration: (node) => check(node.source, node.exportKind === 'type'),
      ImportExpression: (node) => check(node.source, false),
      TSImportType: (node) => check(node.source, true),
    };
  },
};

const plugins = { house: { rules: { 'import-direction': importDirection, 'write-gate': writeGate } } };
const tests = ['**/*.test.{ts,tsx}', '**/testing/**', '**/bench/**', '**/e2e/**'];
const impure = [
  'Date',
  'performance',
  'crypto',
  'process',
  'console',
  'setTimeout',
  'setInterval',
  'fetch',
  'Intl',
];

/** @returns {import('eslint').Linter.Config[]} */
export function directionRules() {
  return [
    {
      files: ['apps/**/*.{ts,tsx}', 'packages/**/*.{ts,tsx}'],
      plugins,
      rules: { 'house/import-direction': 'error' },
    },
    {
      files: ['apps/*/src/**/*.{ts,tsx}', 'packages/*/src/**/*.ts'],
      rules: {
        'no-restricted-exports': ['error', { restrictDefaultExports: { direct: true, named: true } }],
      },
    },
    {
      files: ['packages/metrology/src/**/*.ts'],
      ignores: tests,
      rules: {
        'no-restricted-globals': [
          'error',
          ...impure.map((name) => ({ name, message: 'A calculation depends on its arguments alone.' })),
        ],
        'no-restricted-properties': [
          'error',
          { object: 'Math', property: 'random', message: 'A calculation depends on its arguments alone.' },
        ],
      },
    },
    {
      files: ['apps/api/src/**/*.ts'],
      ignores: [...tests, 'apps/api/src/database/**'],
      plugins,
      rules: { 'house/write-gate': 'error' },
    },
    {
      files: ['apps/api/src/**/*.ts'],
      ignores: [...tests, 'apps/api/src/config.ts', 'apps/api/src/main.ts', 'apps/api/src/demo/**'],
      rules: {
        'no-restricted-properties': [
          'error',
          { object: 'process', property: 'env', message: 'The environment is read once, in config.ts.' },
        ],
      },
    },
  ];
}
