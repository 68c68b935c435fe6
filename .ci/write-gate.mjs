// A write outside the write transaction can report success and then vanish with somebody else's rollback.
const writes = new Set([
  'save',
  'insert',
  'upsert',
  'update',
  'updateAll',
  'delete',
  'deleteAll',
  'remove',
  'softDelete',
  'softRemove',
  'increment',
  'decrement',
  'clear',
]);
const looksLikeDatabase = /(source|reader|writer|repo|repository|manager|database|db|connection)$/i;

function rootOf(node) {
  let at = node;
  for (;;) {
    if (at.type === 'MemberExpression') at = at.object;
    else if (at.type === 'CallExpression') at = at.callee;
    else if (at.type === 'TSNonNullExpression' || at.type === 'AwaitExpression')
      at = at.expression ?? at.argument;
    else return at;
  }
}

function nameChain(node) {
  if (node.type === 'Identifier') return [node.name];
  if (node.type === 'MemberExpression') {
    return [...nameChain(node.object), node.property.type === 'Identifier' ? node.property.name : ''];
  }
  if (node.type === 'CallExpression') return nameChain(node.callee);
  if (node.type === 'TSNonNullExpression') return nameChain(node.expression);
  return [];
}

function variableOf(scope, name) {
  for (let at = scope; at; at = at.upper) {
    const found = at.set.get(name);
    if (found) return found;
  }
  return null;
}

const calleeName = (call) =>
  call.callee.type === 'MemberExpression'
    ? call.callee.property.name
    : call.callee.type === 'Identifier'
      ? call.callee.name
      : '';

/** The manager handed in by the gate, or one passed down as a parameter typed EntityManager. */
function isGateManager(definition) {
  if (definition.type !== 'Parameter') return false;
  const annotation = definition.name.typeAnnotation?.typeAnnotation;
  if (annotation?.type === 'TSTypeReference' && annotation.typeName.name === 'EntityManager') return true;
  const call = definition.node.parent;
  return call?.type === 'CallExpression' && ['writeTransaction', 'transact'].includes(calleeName(call));
}

function comesFromGate(scope, name) {
  const definition = variableOf(scope, name)?.defs[0];
  if (!definition) return false;
  if (isGateManager(definition)) return true;
  // const rows = m.getRepository(Row): as good as its manager.
  if (definition.type !== 'Variable' || !definition.node.init) return false;
  const origin = rootOf(definition.node.init);
  return origin.type === 'Identifier' && origin.name !== name && comesFromGate(scope, origin.name);
}

export const writeGate = {
  meta: {
    type: 'problem',
    docs: { description: 'Every database write goes through writeTransaction.' },
    messages: {
      outside: "'{{call}}' writes outside the write transaction: use the manager writeTransaction hands in.",
      nested:
        "'.transaction(' opens a second transaction: use writeTransaction from database/write-transaction.ts.",
    },
    schema: [],
  },
  create(context) {
    return {
      CallExpression(node) {
        if (node.callee.type !== 'MemberExpression' || node.callee.property.type !== 'Identifier') return;
        const method = node.callee.property.name;
        if (method === 'transaction') return context.report({ node, messageId: 'nested' });
        if (!writes.has(method)) return;
        const origin = rootOf(node.callee.object);
        if (origin.type !== 'Identifier') return;
        const scope = context.sourceCode.getScope(node);
        if (comesFromGate(scope, origin.name)) return;
        const init = variableOf(scope, origin.name)?.defs[0]?.node.init;
        const names = [...(init ? nameChain(init) : []), ...nameChain(node.callee.object)];
        if (names.some((name) => looksLikeDatabase.test(name) || name === 'getRepository')) {
          context.report({ node, messageId: 'outside', data: { call: [...names, method].join('.') } });
        }
      },
    };
  },
};
