// npm run docs -w packages/metrology: the reference of every public name, as pages in dist/docs/metrology.
import { copyFileSync, mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { packageFolder, readRooms } from './read-exports.mjs';
import { firstPage, roomPage } from './render-page.mjs';

const target = resolve(packageFolder, '../../dist/docs/metrology');
const rooms = readRooms();
rmSync(target, { recursive: true, force: true });
mkdirSync(target, { recursive: true });
copyFileSync(join(packageFolder, 'docs/reference.css'), join(target, 'reference.css'));
writeFileSync(join(target, 'index.html'), firstPage(rooms));
for (const room of rooms) writeFileSync(join(target, `${room.room}.html`), roomPage(rooms, room));

const bare = rooms.flatMap(({ entries }) =>
  entries
    .filter(({ kind, summary }) => kind === 'function' && summary === '')
    .map(({ file, name }) => `${file}: ${name}`),
);
const names = rooms.reduce((sum, { entries }) => sum + entries.length, 0);
console.log(`${names} names in ${rooms.length} rooms written to dist/docs/metrology`);
if (bare.length > 0) {
  console.log(`Functions without a docstring:\n${bare.join('\n')}`);
  process.exitCode = 1;
}
