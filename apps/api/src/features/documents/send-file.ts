import { pipeline } from 'node:stream/promises';
import { problemTypes } from '@trammel/shared/problem';
import type { Request, Response } from 'express';
import { BorderProblem } from '../../http/problems.ts';
import type { ByteRange, FileStore } from '../../storage/file-store.ts';
import type { FileRow } from './documents.queries.ts';

/** Sends a file or one range of it as something to be kept, never as something a browser would run here. */
export async function sendFile(req: Request, res: Response, store: FileStore, file: FileRow): Promise<void> {
  const etag = `"${file.sha256}"`;
  const range = requestedRange(req, etag, file.size);
  const body = await store.open(file.objectKey, range);
  res.status(range ? 206 : 200);
  res.setHeader('Content-Type', file.mediaType);
  res.setHeader('Content-Length', range ? range.end - range.start + 1 : file.size);
  if (range) res.setHeader('Content-Range', `bytes ${range.start}-${range.end}/${file.size}`);
  res.setHeader('Accept-Ranges', 'bytes');
  res.setHeader('ETag', etag);
  res.setHeader('Content-Disposition', attachment(file.name));
  res.setHeader('Content-Security-Policy', "sandbox; default-src 'none'");
  res.setHeader('X-Content-Type-Options', 'nosniff');
  if (req.method === 'HEAD') {
    body.destroy();
    res.end();
    return;
  }
  // A reader who goes away in the middle is no fault of ours.
  await pipeline(body, res).catch((error: NodeJS.ErrnoException) => {
    if (error.code !== 'ERR_STREAM_PREMATURE_CLOSE') throw error;
  });
}

/** RFC 6266: a plain form for old clients and the exact name in UTF-8. */
export function attachment(name: string): string {
  const plain = name.replace(/[^\x20-\x7e]|["\\%]/g, '_');
  const exact = encodeURIComponent(name).replace(
    /['()*]/g,
    (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `attachment; filename="${plain}"; filename*=UTF-8''${exact}`;
}

function requestedRange(req: Request, etag: string, size: number): ByteRange | undefined {
  const header = req.get('range');
  const condition = req.get('if-range');
  if (header === undefined || (condition !== undefined && condition !== etag)) return undefined;
  // Several ranges at once are answered with the whole, as RFC 9110 allows.
  const match = /^bytes=(\d{0,15})-(\d{0,15})$/.exec(header.trim());
  if (!match || (match[1] === '' && match[2] === '')) return undefined;
  const [, first = '', last = ''] = match;
  const start = first === '' ? Math.max(0, size - Number(last)) : Number(first);
  const end = first === '' || last === '' ? size - 1 : Math.min(Number(last), size - 1);
  if (start >= size || start > end) {
    throw new BorderProblem(
      416,
      'No such part of the file',
      problemTypes.malformed,
      `The file has ${size} bytes.`,
      {
        'Content-Range': `bytes */${size}`,
      },
    );
  }
  return { start, end };
}
