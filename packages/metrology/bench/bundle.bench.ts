import { dirname } from 'node:path';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import { build } from 'vite';
import { atMost } from '../../../.ci/bench-harness.mjs';

const source = `${dirname(dirname(fileURLToPath(import.meta.url)))}/src`;

async function compressed(room: string): Promise<number> {
  const result = await build({
    configFile: false,
    logLevel: 'silent',
    build: {
      write: false,
      minify: true,
      target: 'es2022',
      rolldownOptions: { input: `${source}/${room}/index.ts`, preserveEntrySignatures: 'strict' },
    },
  });
  const outputs = Array.isArray(result) ? result : [result];
  const code = outputs.flatMap((output) =>
    'output' in output ? output.output.map((chunk) => (chunk.type === 'chunk' ? chunk.code : '')) : [],
  );
  return gzipSync(code.join('\n')).length / 1000;
}

atMost(
  'conformance for the browser, minified and gzipped, every export kept',
  await compressed('conformance'),
  'kB',
  15,
);
