import { existsSync, readdirSync } from 'node:fs';
import { dirname, join, relative, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';

export const packageFolder = dirname(dirname(fileURLToPath(import.meta.url)));
const source = join(packageFolder, 'src');

/** Rooms in the order a reader meets them; a room that is not named here follows at the end. */
const ORDER = [
  'conformance',
  'tolerance-notation',
  'decimal',
  'units',
  'statistics',
  'control-charts',
  'capability',
  'process-scan',
  'measurement-systems',
  'sampling',
  'distributions',
];

/** @param {ts.Symbol} symbol @param {ts.TypeChecker} checker */
function kindOf(symbol, checker) {
  if (symbol.flags & ts.SymbolFlags.Function) return 'function';
  if (symbol.flags & ts.SymbolFlags.Class) return 'class';
  if (symbol.flags & ts.SymbolFlags.Interface) return 'interface';
  if (symbol.flags & ts.SymbolFlags.TypeAlias) return 'type';
  const declaration = symbol.valueDeclaration;
  if (declaration === undefined) return 'type';
  return checker.getTypeOfSymbol(symbol).getCallSignatures().length > 0 ? 'function' : 'constant';
}

/** The comment that stands directly above a declaration, without its stars. @param {ts.Node} node */
function commentAbove(node) {
  const text = node.getSourceFile().text;
  const owner = ts.isVariableDeclaration(node) ? node.parent.parent : node;
  const last = ts.getLeadingCommentRanges(text, owner.pos)?.at(-1);
  const raw = last === undefined ? '' : text.slice(last.pos, last.end);
  if (!raw.startsWith('/**')) return '';
  return raw
    .slice(3, -2)
    .split('\n')
    .map((line) => line.replace(/^\s*\*? ?/, ''))
    .join('\n')
    .trim();
}

/** The declaration as code: a function up to its body, a constant with its type. @param {ts.Node} node */
function signatureOf(node, symbol, checker) {
  const file = node.getSourceFile();
  if (ts.isFunctionDeclaration(node)) {
    const end = node.body === undefined ? node.end : node.body.getStart(file);
    return file.text.slice(node.getStart(file), end).trim();
  }
  if (ts.isVariableDeclaration(node))
    return `export const ${symbol.name}: ${checker.typeToString(
      checker.getTypeOfSymbol(symbol),
      node,
      ts.TypeFormatFlags.NoTruncation,
    )}`;
  return file.text.slice(node.getStart(file), node.end).trim();
}

/** @param {ts.Symbol} exported @param {ts.TypeChecker} checker */
function entryOf(exported, checker) {
  const symbol = exported.flags & ts.SymbolFlags.Alias ? checker.getAliasedSymbol(exported) : exported;
  const declarations = symbol.declarations ?? [];
  const node = declarations[0];
  if (node === undefined) return [];
  const file = node.getSourceFile();
  const written = declarations.map((declaration) => signatureOf(declaration, symbol, checker));
  return [
    {
      name: exported.name,
      kind: kindOf(symbol, checker),
      summary: declarations.map(commentAbove).filter(Boolean).join('\n\n'),
      signature: written.join('\n'),
      file: relative(packageFolder, file.fileName).split(sep).join('/'),
    },
  ];
}

/**
 * Reads every public name of the package from the index of its rooms: what it is, its docstring, its signature.
 * @returns {{ room: string, path: string, entries: ReturnType<typeof entryOf> }[]}
 */
export function readRooms() {
  const rooms = readdirSync(source)
    .filter((room) => existsSync(join(source, room, 'index.ts')))
    .sort((a, b) => (ORDER.indexOf(a) + 1 || 99) - (ORDER.indexOf(b) + 1 || 99));
  const program = ts.createProgram(
    [...rooms.map((room) => join(source, room, 'index.ts')), join(source, 'result.ts')],
    {
      target: ts.ScriptTarget.ES2022,
      lib: ['lib.es2023.d.ts'],
      module: ts.ModuleKind.ESNext,
      moduleResolution: ts.ModuleResolutionKind.Bundler,
      allowImportingTsExtensions: true,
      resolveJsonModule: true,
      strict: true,
      noEmit: true,
      types: [],
    },
  );
  const checker = program.getTypeChecker();
  const exportsOf = (path) => {
    const file = program.getSourceFile(path);
    const symbol = file && checker.getSymbolAtLocation(file);
    return symbol ? checker.getExportsOfModule(symbol) : [];
  };
  const result = {
    room: 'result',
    path: '@trammel/metrology',
    entries: exportsOf(join(source, 'result.ts')).flatMap((symbol) => entryOf(symbol, checker)),
  };
  const known = new Set(result.entries.map(({ name }) => name));
  return [
    result,
    ...rooms.map((room) => ({
      room,
      path: `@trammel/metrology/${room}`,
      entries: exportsOf(join(source, room, 'index.ts'))
        .filter(({ name }) => !known.has(name))
        .flatMap((symbol) => entryOf(symbol, checker)),
    })),
  ];
}
