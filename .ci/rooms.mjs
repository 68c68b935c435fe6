// Which room of the house a file stands in, and which rooms it may import.
import { readFileSync, readdirSync } from 'node:fs';
import { isBuiltin } from 'node:module';
import { dirname, join, posix, relative, sep } from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = dirname(dirname(fileURLToPath(import.meta.url)));

const workspaces = {
  'apps/api': 'api',
  'apps/portal': 'portal',
  'packages/shared': 'shared',
  'packages/metrology': 'metrology',
};
const packageNames = {
  '@trammel/api': 'api',
  '@trammel/portal': 'portal',
  '@trammel/shared': 'shared',
  '@trammel/metrology': 'metrology',
};
const workspaceMayImport = {
  api: ['shared', 'metrology'],
  portal: ['shared', 'metrology'],
  shared: [],
  metrology: [],
};

/** A room may import itself and the rooms named here; `features` and `testing` have rules of their own below. */
export const roomMayImport = {
  api: {
    config: [],
    database: ['config'],
    http: ['config', 'database'],
    storage: ['config', 'database', 'http'],
    mail: ['config', 'database', 'http'],
    tables: [],
    evidence: ['config', 'database', 'http'],
    features: ['config', 'database', 'http', 'storage', 'mail', 'tables', 'evidence'],
    demo: ['config'],
    seed: ['config', 'database', 'http', 'storage', 'evidence', 'features'],
    app: ['config', 'database', 'http', 'storage', 'mail', 'tables', 'evidence', 'features'],
    main: ['config', 'database', 'http', 'storage', 'mail', 'tables', 'evidence', 'features', 'app', 'seed'],
  },
  portal: {
    lib: [],
    components: ['lib'],
    features: ['lib', 'components'],
    app: ['lib', 'components', 'features'],
    main: ['lib', 'components', 'features', 'app'],
  },
};

/** Components draw what they are given: no data, no session, no routes. */
const closedToComponents = ['api-client', 'query-client', 'session', 'permissions', 'paths'];

/** Packages with effects are reached through one room only. */
const packageRoom = {
  'better-sqlite3': 'database',
  '@aws-sdk/client-s3': 'storage',
  nodemailer: 'mail',
  s3rver: 'demo',
  'smtp-server': 'demo',
  mailparser: 'demo',
};

/** Files at the top of src that are not part of `app`: the ground everything stands on, and the entry. */
const groundFiles = { config: 'config', clock: 'config', main: 'main' };

const isTest = (path) =>
  /\.(test|spec)\.tsx?$/.test(path) || /(^|\/)(testing|e2e|bench)\//.test(path) || /\.bench\.\w+$/.test(path);

/** @param {string} path absolute, or relative to the top of the checkout */
export function locate(path) {
  const file = (path.startsWith(root) ? relative(root, path) : path).split(sep).join('/');
  const base = Object.keys(workspaces).find((folder) => file.startsWith(`${folder}/`));
  if (!base) return { file, workspace: null, room: null, feature: null, test: true };
  const workspace = workspaces[base];
  const inside = file.slice(base.length + 1);
  const test = isTest(inside);
  const source = inside.startsWith('src/') ? inside.slice(4) : null;
  if (source === null) return { file, workspace, room: null, feature: null, test };
  const [head, next] = source.split('/');
  const topFile = next === undefined;
  const name = head.replace(/(\.test)?\.\w+$/, '');
  const room = topFile ? (groundFiles[name] ?? 'app') : head;
  return { file, workspace, room, feature: room === 'features' ? next : null, test };
}

const declared = new Map();
/** The npm packages a workspace names as its own in its package.json. */
function declaredPackages(workspace) {
  if (!declared.has(workspace)) {
    const folder = Object.keys(workspaces).find((key) => workspaces[key] === workspace);
    const manifest = JSON.parse(readFileSync(join(root, folder, 'package.json'), 'utf8'));
    declared.set(workspace, new Set(Object.keys(manifest.dependencies ?? {})));
  }
  return declared.get(workspace);
}

const packageOf = (specifier) =>
  specifier
    .split('/')
    .slice(0, specifier.startsWith('@') ? 2 : 1)
    .join('/');

function judgePackage(from, specifier, typeOnly) {
  const name = packageOf(specifier);
  const target = packageNames[name];
  if (target) {
    if (target === from.workspace) return `${from.workspace} imports its own files by relative path`;
    if (!workspaceMayImport[from.workspace].includes(target))
      return `${from.workspace} never imports ${target}`;
    return null;
  }
  if (from.test) return null;
  if (isBuiltin(specifier)) {
    return from.workspace === 'api' ? null : `${from.workspace} runs without Node: ${specifier} is not there`;
  }
  const onlyRoom = packageRoom[name];
  if (onlyRoom && !(typeOnly || from.room === onlyRoom || from.room === 'main')) {
    return `${name} is reached through ${onlyRoom}/ only`;
  }
  if (!typeOnly && !declaredPackages(from.workspace).has(name)) {
    return `${name} is not a dependency of ${from.workspace} (its package.json)`;
  }
  return null;
}

function judgeFile(from, to) {
  if (!to.workspace) return from.test ? null : 'a source file imports nothing from outside its own workspace';
  if (from.workspace !== to.workspace) {
    if (from.test && workspaceMayImport[from.workspace].includes(to.workspace)) return null;
    return workspaceMayImport[from.workspace].includes(to.workspace)
      ? `${to.workspace} is imported by its package name`
      : `${from.workspace} never imports ${to.workspace}`;
  }
  if (from.test) return null;
  if (to.test) return 'testing/, bench/ and test files are imported by tests only';
  const rooms = roomMayImport[from.workspace];
  if (!rooms) return null;
  if (!from.room || !to.room) return from.room === to.room ? null : 'a source file imports sources only';
  if (!rooms[from.room])
    return `${from.room}/ is no room of ${from.workspace}: add it to the table in .ci/rooms.mjs`;
  if (from.room === 'features' && to.room === 'features' && from.feature !== to.feature) {
    if (from.workspace === 'portal') return 'features meet in app/routes only, never in each other';
    return /\.queries\.ts$/.test(to.file) ? null : "of another feature only its '.queries' may be imported";
  }
  if (from.room !== to.room && !rooms[from.room].includes(to.room)) {
    return `${from.room} never imports ${to.room} (${from.workspace})`;
  }
  if (from.workspace === 'portal' && from.room === 'components' && to.room === 'lib') {
    const module = posix.basename(to.file).replace(/\.tsx?$/, '');
    if (closedToComponents.includes(module))
      return `components hold no data and no routes: not lib/${module}`;
  }
  return null;
}

/**
 * The reason an import is wrong, or null.
 * @param {string} fromPath
 * @param {string} specifier
 * @param {boolean} [typeOnly]
 * @returns {string | null}
 */
export function judgeImport(fromPath, specifier, typeOnly = false) {
  const from = locate(fromPath);
  if (!from.workspace) return null;
  const bare = specifier.replace(/\?.*$/, '');
  if (!bare.startsWith('.')) return judgePackage(from, bare, typeOnly);
  if (!/\.(tsx?|mjs|css|json|svg|sql|ttf|woff2?)$/.test(bare))
    return 'a local import names its file with the extension';
  return judgeFile(from, locate(posix.join(posix.dirname(from.file), bare)));
}

/** Feature names by workspace, read from the folders so that nobody has to remember a list. */
export function featuresOf(workspace) {
  try {
    return readdirSync(join(root, 'apps', workspace, 'src/features'), { withFileTypes: true })
      .filter((entry) => entry.isDirectory())
      .map((entry) => entry.name);
  } catch {
    return [];
  }
}
