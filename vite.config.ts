import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';
import { pdfResources } from './apps/portal/pdf-resources.ts';

const apiAddress = process.env.TRAMMEL_API ?? 'http://127.0.0.1:4180';

const node = (name: string, root: string) => ({
  extends: true as const,
  test: { name, environment: 'node', include: [`${root}/**/*.test.ts`] },
});

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
