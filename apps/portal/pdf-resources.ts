import { cpSync, createReadStream, existsSync, statSync } from 'node:fs';
import { dirname, join, normalize } from 'node:path';
import { createRequire } from 'node:module';
import type { Plugin } from 'vite';

const folders = ['cmaps', 'standard_fonts', 'wasm', 'iccs'];

/** Character maps, standard fonts and colour profiles of pdf.js, served beside the portal: a drawing may need any of them. */
export function pdfResources(): Plugin {
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
