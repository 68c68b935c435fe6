import { declareValuePlugin, PluginKind } from '@stryker-mutator/api/plugin';

const WORDED = new Set(['reason', 'explanation', 'method', 'statement']);

function isWording(path) {
  const { node, parent, key, listKey } = path;
  if (node.type !== 'StringLiteral' && node.type !== 'TemplateLiteral') return false;
  if (parent.type === 'CallExpression' && listKey === 'arguments')
    return parent.callee.name === 'undetermined' && key === 1;
  return parent.type === 'ObjectProperty' && WORDED.has(parent.key.name);
}

/**
 * Leaves out mutants of the words a person reads (reasons, names of methods): a changed sentence is a matter for a
 * reader, not for a test. The codes beside the sentences are mutated like everything else.
 */
export const strykerPlugins = [
  declareValuePlugin(PluginKind.Ignore, 'wording', {
    shouldIgnore: (path) => (isWording(path) ? 'wording' : undefined),
  }),
];
