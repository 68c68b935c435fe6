import { readdirSync } from 'node:fs';
import { basename, join } from 'node:path';

const source = join(import.meta.dirname, 'src');
const workers = readdirSync(source, { recursive: true, encoding: 'utf8' }).filter((file) =>
  file.endsWith('.worker.ts'),
);

/**
 * The API for Node: one bundle, and one beside it for each worker thread. npm packages stay outside, workspace packages
 * go in as source.
 */
export default {
  root: import.meta.dirname,
  publicDir: false,
  build: {
    ssr: true,
    outDir: '../../dist/api',
    emptyOutDir: true,
    target: 'node20',
    minify: false,
    sourcemap: false,
    rollupOptions: {
      input: {
        main: join(source, 'main.ts'),
        'demo/services': join(source, 'demo/services.ts'),
        ...Object.fromEntries(workers.map((file) => [basename(file, '.ts'), join(source, file)])),
      },
      // Side by side, because the main bundle looks for its workers in its own folder.
      output: { entryFileNames: '[name].js', chunkFileNames: '[name]-[hash].js' },
    },
  },
  ssr: { noExternal: [/^@trammel\//] },
};
