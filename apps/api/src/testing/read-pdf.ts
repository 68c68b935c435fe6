import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Client } from './sign-in.ts';

/** A file as the browser would save it. */
export function download(who: Client, path: string) {
  return who
    .get(path)
    .buffer(true)
    .parse((res, done) => {
      const chunks: Buffer[] = [];
      res.on('data', (chunk: Buffer) => chunks.push(chunk));
      res.on('end', () => done(null, Buffer.concat(chunks)));
    });
}

interface PdfPage {
  getTextContent(options: { disableNormalization: boolean }): Promise<{ items: { str?: string }[] }>;
}
interface PdfJs {
  getDocument(source: { data: Uint8Array; standardFontDataUrl: string }): {
    promise: Promise<{ numPages: number; getPage(number: number): Promise<PdfPage> }>;
  };
}

/** Text of each page as a reader of the file gets it: by the letters' codes, not as it was written. */
export async function pdfText(bytes: Uint8Array): Promise<string[]> {
  const installed = createRequire(import.meta.url);
  const entry = installed.resolve('pdfjs-dist/legacy/build/pdf.mjs');
  const pdfjs = (await import(/* @vite-ignore */ pathToFileURL(entry).href)) as PdfJs;
  const fonts = join(dirname(installed.resolve('pdfjs-dist/package.json')), 'standard_fonts/');
  const data = new Uint8Array(bytes);
  const file = await pdfjs.getDocument({ data, standardFontDataUrl: fonts }).promise;
  const pages: string[] = [];
  for (let number = 1; number <= file.numPages; number += 1) {
    const content = await (await file.getPage(number)).getTextContent({ disableNormalization: true });
    pages.push(
      content.items
        .map((item) => item.str ?? '')
        .join(' ')
        .replace(/\s+/g, ' '),
    );
  }
  return pages;
}

/** Without blanks: where a line breaks is no part of the text. */
export const squeezed = (text: string) => text.replace(/\s/g, '');
