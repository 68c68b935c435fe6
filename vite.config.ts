import { cpSync, createReadStream, existsSync, statSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join, normalize } from 'node:path';
import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import type { Plugin } from 'vite';
import { defineConfig } from 'vitest/config';

const apiAddress = process.env.TRAMMEL_API ?? 'http://127.0.0.1:4180';

const node = (name: string, root: string) => ({
  extends: true as const,
  test: { name, environment: 'node', include: [`${root}/**/*.test.ts`] },
});

const folders = ['cmaps', 'standard_fonts', 'wasm', 'iccs'];

/** Character maps, standard fonts and colour profiles of pdf.js, served beside the portal: a drawing may need any of them. */
function pdfResources(): Plugin {
  const source = dirname(createRequire(import.meta.url).resolve('pdfjs-dist/package.json'));
  let outDir = '';
  return {
    name: 'pdf-resources',
    configResolved(config) {
      outDir = join(config.root, config.build.outDir);
    },
    configureServer(server) {
      server.middlewares.use('/pdfjs', (request, response, next) => {
        const path = normalize(decodeURIComponent((request.url ?? '').split('?')[0] ?? ''));
        const file = join(source, path);
        const known =
          folders.some((folder) => path.startsWith(`/${folder}/`)) &&
          existsSync(file) &&
          statSync(file).isFile();
        if (known) createReadStream(file).pipe(response);
        else next();
      });
    },
    closeBundle() {
      if (!existsSync(outDir)) return;
      for (const folder of folders)
        cpSync(join(source, folder), join(outDir, 'pdfjs', folder), { recursive: true });
    },
  };
}

export default defineConfig({
  publicDir: 'apps/portal/public',
  plugins: [react(), tailwindcss(), pdfResources()],
  build: { outDir: 'dist/portal', emptyOutDir: true, target: 'es2022', assetsInlineLimit: 0, manifest: true },
  server: { port: 4181, strictPort: false, proxy: { '/api': { target: apiAddress } } },
  test: {
    projects: [
      node('metrology', 'packages/metrology'),
      node('shared', 'packages/shared'),
      {
        extends: true,
        test: {
          name: 'api',
          environment: 'node',
          include: ['apps/api/**/*.test.ts'],
          globalSetup: ['apps/api/src/testing/global-setup.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      node('house', '.ci'),
      {
        extends: true,
        test: {
          name: 'portal',
          environment: 'jsdom',
          include: ['apps/portal/src/**/*.test.{ts,tsx}'],
          setupFiles: ['apps/portal/src/testing/setup.ts'],
          testTimeout: 30_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'e2e',
          environment: 'node',
          include: ['apps/portal/e2e/specs/**/*.spec.ts'],
          globalSetup: ['apps/portal/e2e/global-setup.ts'],
          testTimeout: 240_000,
          hookTimeout: 120_000,
          fileParallelism: false,
        },
      },
    ],
  },
});
